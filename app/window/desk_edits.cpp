// The edits that start at the desk: each one is written first, then shown.

#include <QDateTime>

#include "app/window/desk.h"
#include "app/window/look/words.h"

namespace unstring {
namespace {

std::string user_name() {
    const QString name = qEnvironmentVariable("USER", qEnvironmentVariable("LOGNAME"));
    return name.isEmpty() ? std::string("planner") : name.toStdString();
}

} // namespace

bool Desk::may_edit() {
    if (!is_open()) return false;
    if (is_running()) {
        say(tr("%1 is running. Cancel it, or wait for its end, then edit.").arg(step_word(*running_)), true);
        return false;
    }
    if (view().is_read_only) {
        say(tr("This project is open to read only: %1.").arg(to_q(view().read_only_reason)), true);
        return false;
    }
    return true;
}

bool Desk::write(const Plan& next, const QString& label) {
    const auto change = link_.edit(next, label.toStdString());
    if (!change) {
        say(to_q(fault_text(change.error())), true);
        return false;
    }
    take_view();
    if (change->is_empty())
        say(tr("Nothing to change: it is so already."));
    else
        say(tr("%1. On disk at %2.").arg(label, QDateTime::currentDateTime().toString("HH:mm:ss")));
    return true;
}

std::vector<PoleIx> Desk::selected_candidates() {
    std::vector<PoleIx> candidates;
    for (const PoleIx pole : selection_)
        if (is_candidate(view().city, view().city.poles[pole.place()])) candidates.push_back(pole);
    if (selection_.empty())
        say(tr("No pole is chosen: click one on the map or on the rail."), true);
    else if (candidates.empty())
        say(tr("Not a lamp on a series string in the plan: there is nothing to decide here."), true);
    return candidates;
}

QString Desk::selection_words(const std::vector<PoleIx>& poles) const {
    if (poles.size() == 1) return tr("pole %1").arg(to_q(view().city.poles[poles.front().place()].id));
    return count_text(long(poles.size()), tr("pole"), tr("poles"));
}

void Desk::mark(Choice choice) {
    if (!may_edit()) return;
    const std::vector<PoleIx> poles = selected_candidates();
    if (poles.empty()) return;
    Plan next = view().plan;
    for (const PoleIx pole : poles) {
        next.poles[pole.place()].mark = choice;
        next.poles[pole.place()].who = user_name();
    }
    write(next, tr("mark %1: %2").arg(choice_word(choice), selection_words(poles)));
}

void Desk::lock() {
    if (!may_edit()) return;
    std::vector<PoleIx> poles = selected_candidates();
    if (poles.empty()) return;
    Plan next = view().plan;
    std::size_t without = 0;
    for (const PoleIx pole : poles) {
        PolePlan& row = next.poles[pole.place()];
        const Choice order = row.mark != Choice::undecided ? row.mark : row.choice;
        if (order == Choice::undecided)
            ++without;
        else
            row.lock = order;
    }
    if (without == poles.size()) {
        say(tr("Nothing to lock yet: run decide, or mark the pole first (K, R or S)."), true);
        return;
    }
    write(next, tr("lock: %1").arg(selection_words(poles)));
}

void Desk::clear_marks() {
    if (!may_edit()) return;
    const std::vector<PoleIx> poles = selected_candidates();
    if (poles.empty()) return;
    Plan next = view().plan;
    for (const PoleIx pole : poles) {
        PolePlan& row = next.poles[pole.place()];
        row.mark = row.lock = Choice::undecided;
        row.who.clear();
    }
    write(next, tr("clear mark and lock: %1").arg(selection_words(poles)));
}

void Desk::set_work_year(int year) {
    if (!may_edit()) return;
    std::vector<PoleIx> poles = selected_candidates();
    std::erase_if(poles, [this](PoleIx pole) {
        const PolePlan& row = view().plan.poles[pole.place()];
        return row.year_locked || (row.choice != Choice::rewire && row.choice != Choice::solar);
    });
    if (poles.empty()) {
        if (!selection_.empty()) say(tr("No work to move: kept, not decided, or its year is locked."), true);
        return;
    }
    Plan next = view().plan;
    year = std::clamp(year, next.settings.first_year, next.last_year());
    for (const PoleIx pole : poles) {
        next.poles[pole.place()].year = year;
        next.poles[pole.place()].year_by = YearBy::hand;
    }
    write(next, tr("work in %1: %2").arg(year).arg(selection_words(poles)));
}

void Desk::toggle_year_lock() {
    if (!may_edit()) return;
    std::vector<PoleIx> poles = selected_candidates();
    std::erase_if(poles, [this](PoleIx pole) { return view().plan.poles[pole.place()].year == 0; });
    if (poles.empty()) {
        if (!selection_.empty()) say(tr("No year to lock yet: run phase first."), true);
        return;
    }
    const bool was_locked = view().plan.poles[poles.front().place()].year_locked;
    Plan next = view().plan;
    for (const PoleIx pole : poles) next.poles[pole.place()].year_locked = !was_locked;
    write(next, (was_locked ? tr("free the year: %1") : tr("lock the year: %1")).arg(selection_words(poles)));
}

void Desk::undo() {
    if (!may_edit()) return;
    const auto change = link_.undo();
    if (!change)
        say(to_q(fault_text(change.error())), true);
    else if (!*change)
        say(tr("Nothing to undo."));
    else {
        take_view();
        say(tr("Undone: %1").arg(to_q((*change)->label)));
    }
}

void Desk::redo() {
    if (!may_edit()) return;
    const auto change = link_.redo();
    if (!change)
        say(to_q(fault_text(change.error())), true);
    else if (!*change)
        say(tr("Nothing to redo."));
    else {
        take_view();
        say(tr("Done again: %1").arg(to_q((*change)->label)));
    }
}

void Desk::show_preview(Plan next) {
    PhaseResult phase = link_.preview(next);
    preview_ = Preview{std::move(next), std::move(phase)};
    Q_EMIT preview_changed();
}

void Desk::drop_preview() {
    if (!preview_) return;
    preview_.reset();
    Q_EMIT preview_changed();
}

void Desk::write_preview(const QString& label) {
    if (!preview_) return;
    const Plan next = std::move(preview_->plan);
    preview_.reset();
    if (may_edit() && write(next, label)) return;
    Q_EMIT preview_changed();
}

} // namespace unstring
