#include "app/window/gather_dialog.h"

#include <QFileDialog>
#include <QGridLayout>
#include <QLabel>
#include <QVBoxLayout>

#include <array>

#include "app/window/look/look.h"
#include "app/window/look/words.h"

namespace unstring {
namespace {

struct Table {
    const char *key, *what, *needed;
    std::string GatherFiles::*file;
};

constexpr std::array<Table, 14> kTables{{
    {"poles", "place, string, lamp, height of each pole", "needed", &GatherFiles::poles},
    {"circuits", "current, station, cable of each string", "needed", &GatherFiles::circuits},
    {"transformers", "rating and state, in service or spare", "needed", &GatherFiles::transformers},
    {"services", "where 120/240 V can be had, and how much", "for rewire", &GatherFiles::services},
    {"streets", "centre lines, width, surface", "for rewire", &GatherFiles::streets},
    {"canopy", "heights above ground, as raster or outlines", "for solar", &GatherFiles::canopy},
    {"obstacles", "outlines of buildings with height", "for solar", &GatherFiles::obstacles},
    {"climate", "twelve months, or hours of one year", "for solar", &GatherFiles::climate},
    {"prices", "your unit prices; else the default book", "when you have one", &GatherFiles::prices},
    {"catalogue", "lamps, solar heads, luminaires, cables", "when you have one", &GatherFiles::catalogue},
    {"budget", "money and crew hours of each year", "for phase", &GatherFiles::budget},
    {"cutbacks", "where a string can be spliced across", "when known", &GatherFiles::cutbacks},
    {"marks", "wishes of the staff", "when there are any", &GatherFiles::marks},
    {"asbuilt", "what crews have done", "when there is any", &GatherFiles::asbuilt},
}};

} // namespace

GatherDialog::GatherDialog(const QString& project_path, QWidget* parent) : QDialog(parent) {
    setObjectName("gather_dialog");
    setWindowTitle(tr("Gather a city's files"));
    setMinimumWidth(820);
    auto* column = new QVBoxLayout(this);
    auto* head = new QLabel(tr("One file a table; leave a line empty where there is no file. Tables that are "
                               "in the project already stay as they are."),
                            this);
    head->setWordWrap(true);
    head->setFont(text_font(12.5));
    column->addWidget(head);
    auto* grid = new QGridLayout;
    grid->setHorizontalSpacing(12);
    grid->setVerticalSpacing(3);
    int row = 0;
    project_ = new QLineEdit(project_path, this);
    project_->setObjectName("gather_project");
    project_->setReadOnly(!project_path.isEmpty());
    auto* pick = new QPushButton(tr("choose"), this);
    pick->setEnabled(project_path.isEmpty());
    connect(pick, &QPushButton::clicked, this, [this] {
        const QString chosen =
            QFileDialog::getSaveFileName(this, tr("New project file"), QStringLiteral("city.unstring"),
                                         tr("Unstring projects (*.unstring *.gpkg)"));
        if (!chosen.isEmpty()) project_->setText(chosen);
    });
    auto* project_word = new QLabel(tr("project file"), this);
    project_word->setFont(text_font(12.5, Weight::bold));
    grid->addWidget(project_word, row, 0);
    grid->addWidget(new QLabel(tr("one file that holds everything"), this), row, 1);
    grid->addWidget(project_, row, 3);
    grid->addWidget(pick, row++, 4);
    for (const Table& table : kTables)
        lines_[table.key] =
            add_line(grid, row++, QLatin1String(table.key), tr(table.what), tr(table.needed), table.key);
    grid->setColumnStretch(3, 1);
    column->addLayout(grid);
    auto* crs_row = new QGridLayout;
    const auto field = [&](int at, const QString& word, const QString& hint, const char* key) {
        auto* label = new QLabel(word, this);
        auto* edit = new QLineEdit(this);
        edit->setObjectName(QStringLiteral("gather_") + QLatin1String(key));
        edit->setPlaceholderText(hint);
        crs_row->addWidget(label, 0, 2 * at), crs_row->addWidget(edit, 0, 2 * at + 1);
        lines_[key] = edit;
    };
    field(0, tr("coordinates"), tr("from the files, or EPSG:n"), "crs");
    field(1, tr("encoding"), tr("found by itself"), "encoding");
    field(2, tr("column names"), tr("map.json"), "columns");
    column->addLayout(crs_row);
    auto* buttons = new QHBoxLayout;
    read_ = new QPushButton(tr("Read the files"), this);
    read_->setObjectName("gather_read");
    read_->setDefault(true);
    auto* leave = new QPushButton(tr("Not now"), this);
    buttons->addStretch(1);
    buttons->addWidget(leave);
    buttons->addWidget(read_);
    column->addLayout(buttons);
    connect(read_, &QPushButton::clicked, this, &QDialog::accept);
    connect(leave, &QPushButton::clicked, this, &QDialog::reject);
    connect(project_, &QLineEdit::textChanged, this, &GatherDialog::check);
    check();
}

QLineEdit* GatherDialog::add_line(QGridLayout* grid, int row, const QString& name, const QString& what,
                                  const QString& needed, const char* object) {
    auto* word = new QLabel(name, this);
    word->setFont(text_font(12.5, Weight::bold));
    auto* hint = new QLabel(what, this);
    hint->setFont(text_font(12));
    auto* need = new QLabel(needed, this);
    need->setFont(text_font(11));
    auto* edit = new QLineEdit(this);
    edit->setObjectName(QStringLiteral("gather_") + QLatin1String(object));
    edit->setAccessibleName(tr("file of %1").arg(name));
    auto* pick = new QPushButton(tr("choose"), this);
    connect(pick, &QPushButton::clicked, this, [this, edit, name] {
        const QString chosen = QFileDialog::getOpenFileName(this, tr("File of %1").arg(name), edit->text());
        if (!chosen.isEmpty()) edit->setText(chosen);
    });
    connect(edit, &QLineEdit::textChanged, this, [this] { check(); });
    grid->addWidget(word, row, 0), grid->addWidget(hint, row, 1), grid->addWidget(need, row, 2),
        grid->addWidget(edit, row, 3), grid->addWidget(pick, row, 4);
    return edit;
}

void GatherDialog::check() {
    if (read_ == nullptr) return;
    bool has_file = false;
    for (const Table& table : kTables) has_file = has_file || !lines_[table.key]->text().trimmed().isEmpty();
    read_->setEnabled(has_file && !project_->text().trimmed().isEmpty());
}

GatherWish GatherDialog::wish() const {
    const auto text = [this](const char* key) { return lines_.at(key)->text().trimmed().toStdString(); };
    GatherWish wish;
    wish.project_path = project_->text().trimmed().toStdString();
    for (const Table& table : kTables) wish.files.*table.file = text(table.key);
    wish.files.crs = text("crs"), wish.files.encoding = text("encoding"),
    wish.files.columns = text("columns");
    return wish;
}

} // namespace unstring
