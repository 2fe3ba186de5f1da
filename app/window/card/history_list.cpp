#include "app/window/card/history_list.h"

#include <QVBoxLayout>

#include "app/window/look/words.h"

namespace unstring {
namespace {

constexpr int kMostLines = 500;

} // namespace

HistoryList::HistoryList(Desk& desk, QWidget* parent) : QWidget(parent), desk_(desk) {
    setObjectName("history");
    auto* column = new QVBoxLayout(this);
    column->setContentsMargins(20, 14, 12, 12);
    of_pole_ = new QCheckBox(tr("only what touched the chosen pole"), this);
    of_pole_->setObjectName("history_of_pole");
    of_pole_->setFont(text_font(12.5));
    list_ = new QListWidget(this);
    list_->setObjectName("history_list");
    list_->setAccessibleName(tr("History of edits, newest first"));
    list_->setWordWrap(true);
    list_->setFont(text_font(12.5));
    column->addWidget(of_pole_);
    column->addWidget(list_, 1);
    connect(of_pole_, &QCheckBox::toggled, this, &HistoryList::refresh);
    connect(&desk_, &Desk::view_changed, this, &HistoryList::refresh);
    connect(&desk_, &Desk::selection_changed, this, &HistoryList::refresh);
}

void HistoryList::showEvent(QShowEvent*) { refresh(); }

void HistoryList::refresh() {
    if (!isVisible()) return;
    list_->clear();
    if (!desk_.is_open() || desk_.is_running()) return;
    std::string pole;
    if (of_pole_->isChecked() && !desk_.selection().empty())
        pole = desk_.view().city.poles[desk_.selection().back().place()].id;
    for (const EditLine& line : desk_.history(pole, kMostLines)) {
        const QString what =
            line.undoes != 0 ? tr("undo or redo: %1").arg(to_q(line.label)) : to_q(line.label);
        list_->addItem(QStringLiteral("%1  %2%3")
                           .arg(to_q(line.at).left(19).replace('T', ' '), what,
                                line.who.empty() ? QString() : tr(" (%1)").arg(to_q(line.who))));
    }
    if (list_->count() == 0) list_->addItem(tr("No edit yet."));
}

} // namespace unstring
