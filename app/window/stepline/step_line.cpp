#include "app/window/stepline/step_line.h"

#include <QHBoxLayout>
#include <QMenu>
#include <QPainter>

#include "app/window/look/words.h"

namespace unstring {
namespace {

QPushButton* word_button(const QString& text, const char* name, QWidget* parent) {
    auto* button = new QPushButton(text, parent);
    button->setObjectName(QLatin1String(name));
    button->setFlat(true);
    button->setCursor(Qt::PointingHandCursor);
    return button;
}

} // namespace

StepLine::StepLine(Desk& desk, QWidget* parent) : QWidget(parent), desk_(desk) {
    setObjectName("step_line");
    setFixedHeight(52);
    auto* row = new QHBoxLayout(this);
    row->setContentsMargins(6, 1, 14, 2);
    row->setSpacing(0);
    for (const Step step : kSteps) {
        auto* knot = new StepKnot(desk_, step, this);
        knots_[std::size_t(step)] = knot;
        row->addWidget(knot);
        connect(knot, &QAbstractButton::clicked, this, [this, step] { Q_EMIT step_clicked(step); });
        knot->setContextMenuPolicy(Qt::CustomContextMenu);
        connect(knot, &QWidget::customContextMenuRequested, this,
                [this, knot, step](QPoint at) { show_menu(step, knot->mapToGlobal(at)); });
    }
    row->addSpacing(10);
    run_ = new QPushButton(this);
    run_->setObjectName("run_next");
    cancel_ = new QPushButton(tr("cancel"), this);
    cancel_->setObjectName("cancel_step");
    cancel_->setToolTip(tr("Stops the step. The file stays as it was before it."));
    row->addWidget(run_);
    row->addWidget(cancel_);
    row->addStretch(1);
    undo_ = word_button(tr("undo"), "undo", this);
    redo_ = word_button(tr("redo"), "redo", this);
    night_ = word_button(tr("night"), "night", this);
    row->addWidget(undo_);
    row->addWidget(redo_);
    row->addWidget(night_);
    row->addSpacing(10);
    plan_ = new QLabel(this);
    plan_->setObjectName("plan_name");
    row->addWidget(plan_);
    connect(run_, &QPushButton::clicked, this, [this] { Q_EMIT step_clicked(next_step()); });
    connect(cancel_, &QPushButton::clicked, this, [this] { desk_.cancel(); });
    connect(undo_, &QPushButton::clicked, this, [this] { desk_.undo(); });
    connect(redo_, &QPushButton::clicked, this, [this] { desk_.redo(); });
    connect(night_, &QPushButton::clicked, this, [this] { desk_.set_night(!desk_.look().is_night); });
    for (const auto signal : {&Desk::view_changed, &Desk::closed, &Desk::step_changed, &Desk::look_changed})
        connect(&desk_, signal, this, &StepLine::refresh);
    refresh();
}

Step StepLine::next_step() const {
    if (!desk_.is_open()) return Step::gather;
    for (const Step step : kSteps) {
        const StepStanding standing = desk_.view().steps[std::size_t(step)].standing;
        if (standing != StepStanding::up_to_date && standing != StepStanding::by_hand) return step;
    }
    return Step::hand_out;
}

void StepLine::show_menu(Step step, QPoint at) {
    if (!desk_.is_open() || desk_.is_running()) return;
    auto* menu = new QMenu(this);
    menu->setAttribute(Qt::WA_DeleteOnClose);
    menu->setObjectName("step_menu");
    connect(menu->addAction(tr("Run %1").arg(step_word(step))), &QAction::triggered, this,
            [this, step] { Q_EMIT run_wanted(step); });
    connect(menu->addAction(tr("Show the findings")), &QAction::triggered, this,
            [this] { Q_EMIT findings_wanted(); });
    menu->popup(at);
}

void StepLine::refresh() {
    for (StepKnot* knot : knots_) knot->refresh();
    const bool is_open = desk_.is_open(), is_running = desk_.is_running();
    run_->setVisible(is_open && !is_running && !desk_.view().is_read_only);
    cancel_->setVisible(is_running);
    run_->setText(tr("Run %1").arg(step_word(next_step())));
    run_->setToolTip(tr("The first step that is not up to date. F5 does the same."));
    night_->setText(desk_.look().is_night ? tr("day") : tr("night"));
    night_->setToolTip(tr("Changes between the day and the night sheet. F9 does the same."));
    const auto offer = [&](QPushButton* button, const std::string& label, const QString& word,
                           const QString& keys) {
        button->setEnabled(is_open && !is_running && !label.empty());
        button->setToolTip(label.empty() ? tr("nothing to %1").arg(word)
                                         : tr("%1: %2 (%3)").arg(word, to_q(label), keys));
        button->setAccessibleName(button->toolTip());
    };
    offer(undo_, is_open ? desk_.view().undo_label : std::string(), tr("undo"), QStringLiteral("Ctrl+Z"));
    offer(redo_, is_open ? desk_.view().redo_label : std::string(), tr("redo"),
          QStringLiteral("Ctrl+Shift+Z"));
    undo_->setVisible(is_open), redo_->setVisible(is_open), plan_->setVisible(is_open);
    if (!is_open) return;
    const QFont font = text_font(15, Weight::bold);
    plan_->setFont(font);
    plan_->setText(
        QFontMetricsF(font).elidedText(to_q(desk_.view().plan.settings.name), Qt::ElideRight, 170));
    plan_->setToolTip(tr("plan %1, %2 to %3; the file is %4")
                          .arg(to_q(desk_.view().plan.settings.name))
                          .arg(desk_.view().plan.settings.first_year)
                          .arg(desk_.view().plan.last_year())
                          .arg(to_q(desk_.view().path)));
}

} // namespace unstring
