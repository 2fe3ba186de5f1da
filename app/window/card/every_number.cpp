#include "app/window/card/every_number.h"

#include <QHeaderView>
#include <QLabel>
#include <QTreeWidget>
#include <QVBoxLayout>

#include <array>

#include "app/window/look/words.h"

namespace unstring {
namespace {

void add_option(QTreeWidget* tree, Choice choice, const OptionCost& option, bool is_chosen) {
    QString head = is_chosen ? QObject::tr("%1, chosen").arg(choice_word(choice)) : choice_word(choice);
    if (!option.possible) head += QObject::tr(", stopped: %1").arg(to_q(option.stopped_by));
    auto* top = new QTreeWidgetItem(
        tree, {head, QString(), QString(), QString(), QString(), QString(), number_text(option.cost, 2)});
    for (int column = 0; column < 7; ++column) top->setFont(column, text_font(12.5, Weight::bold));
    for (const CashLine& line : option.lines)
        new QTreeWidgetItem(top, {to_q(line.what), QString::number(line.year), number_text(line.quantity, 2),
                                  number_text(line.unit_price, 2), number_text(to_dollars(line.amount), 2),
                                  number_text(line.factor, 6),
                                  number_text(to_dollars(line.amount) * line.factor, 2)});
    top->setExpanded(is_chosen);
}

} // namespace

EveryNumber::EveryNumber(const Desk& desk, PoleIx pole, QWidget* parent) : QDialog(parent) {
    setObjectName("every_number_window");
    setWindowTitle(tr("Every number of pole %1").arg(to_q(desk.view().city.poles[pole.place()].id)));
    setAttribute(Qt::WA_DeleteOnClose);
    resize(900, 620);
    auto* column = new QVBoxLayout(this);
    auto* reason = new QLabel(this);
    reason->setWordWrap(true);
    reason->setFont(text_font(12.5));
    auto* tree = new QTreeWidget(this);
    tree->setObjectName("every_number_lines");
    tree->setFont(text_font(12.5));
    tree->setHeaderLabels({tr("what"), tr("year"), tr("quantity"), tr("unit price"), tr("amount"),
                           tr("factor"), tr("present value")});
    column->addWidget(reason);
    column->addWidget(tree, 1);
    const PoleDecision* decision = desk.view().decide ? desk.view().decide->find(pole) : nullptr;
    if (decision == nullptr) {
        reason->setText(tr("Nothing is decided for this pole yet."));
        return;
    }
    reason->setText(to_q(decision->reason));
    const std::array<Choice, 3> choices{Choice::keep, Choice::rewire, Choice::solar};
    for (std::size_t i = 0; i < 3; ++i)
        add_option(tree, choices[i], decision->options[i], choices[i] == decision->choice);
    auto* numbers = new QTreeWidgetItem(tree, {tr("numbers of the reason")});
    for (const auto& [name, value] : decision->numbers)
        new QTreeWidgetItem(numbers, {to_q(name).replace('_', ' '), QString(), number_text(value, 3)});
    auto* sources = new QTreeWidgetItem(tree, {tr("sources")});
    for (const std::string& source : decision->sources) {
        auto* item = new QTreeWidgetItem(sources, {to_q(source)});
        item->setFirstColumnSpanned(true);
    }
    for (int i = 1; i < 7; ++i)
        for (QTreeWidgetItemIterator at(tree); *at != nullptr; ++at)
            (*at)->setTextAlignment(i, Qt::AlignRight);
    tree->header()->setSectionResizeMode(QHeaderView::ResizeToContents);
}

} // namespace unstring
