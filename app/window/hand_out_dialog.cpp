#include "app/window/hand_out_dialog.h"

#include <QFileDialog>
#include <QFileInfo>
#include <QFormLayout>
#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

#include "app/window/look/look.h"
#include "app/window/look/words.h"

namespace unstring {

HandOutDialog::HandOutDialog(const ProjectView& view, QWidget* parent) : QDialog(parent) {
    setObjectName("hand_out_dialog");
    setWindowTitle(tr("Hand out the work orders"));
    setMinimumWidth(560);
    auto* column = new QVBoxLayout(this);
    auto* form = new QFormLayout;
    folder_ = new QLineEdit(this);
    folder_->setObjectName("hand_out_folder");
    const QFileInfo project(to_q(view.path));
    folder_->setText(project.absolutePath() + QStringLiteral("/orders of ") + project.completeBaseName());
    auto* pick = new QPushButton(tr("Choose a folder"), this);
    connect(pick, &QPushButton::clicked, this, [this] {
        const QString chosen =
            QFileDialog::getExistingDirectory(this, tr("Folder for the work orders"), folder_->text());
        if (!chosen.isEmpty()) folder_->setText(chosen);
    });
    auto* where = new QHBoxLayout;
    where->addWidget(folder_, 1);
    where->addWidget(pick);
    year_ = new QComboBox(this);
    year_->setObjectName("hand_out_year");
    year_->addItem(tr("every year"), 0);
    for (int year = view.plan.settings.first_year; year <= view.plan.last_year(); ++year)
        year_->addItem(QString::number(year), year);
    crew_ = new QComboBox(this);
    crew_->setObjectName("hand_out_crew");
    crew_->addItem(tr("every crew"), QString());
    for (const char* crew : {"line", "civil", "lighting", "electric"})
        crew_->addItem(QLatin1String(crew), QLatin1String(crew));
    paper_ = new QComboBox(this);
    paper_->setObjectName("hand_out_paper");
    paper_->addItem(tr("A4"), QStringLiteral("a4"));
    paper_->addItem(tr("Letter"), QStringLiteral("letter"));
    form->addRow(tr("folder"), where);
    form->addRow(tr("year"), year_);
    form->addRow(tr("crew"), crew_);
    form->addRow(tr("paper"), paper_);
    column->addLayout(form);
    auto* cautions = new QLabel(standing_cautions(), this);
    cautions->setObjectName("standing_cautions");
    cautions->setWordWrap(true);
    cautions->setFont(text_font(12));
    column->addWidget(cautions);
    auto* buttons = new QHBoxLayout;
    auto* write = new QPushButton(tr("Write the orders"), this);
    write->setObjectName("hand_out_write");
    write->setDefault(true);
    auto* leave = new QPushButton(tr("Not now"), this);
    buttons->addStretch(1);
    buttons->addWidget(leave);
    buttons->addWidget(write);
    column->addLayout(buttons);
    connect(write, &QPushButton::clicked, this, &QDialog::accept);
    connect(leave, &QPushButton::clicked, this, &QDialog::reject);
    connect(folder_, &QLineEdit::textChanged, write,
            [write](const QString& text) { write->setEnabled(!text.trimmed().isEmpty()); });
}

HandOutOptions HandOutDialog::options() const {
    HandOutOptions options;
    options.to = folder_->text().trimmed().toStdString();
    if (const int year = year_->currentData().toInt(); year != 0) options.year = year;
    options.crew = crew_->currentData().toString().toStdString();
    options.paper = paper_->currentData().toString().toStdString();
    return options;
}

} // namespace unstring
