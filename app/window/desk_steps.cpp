// Steps run in a working thread; the screen hears of progress through the event queue only.

#include <QDateTime>
#include <QtConcurrentRun>

#include <exception>

#include "app/window/desk.h"
#include "app/window/look/words.h"

namespace unstring {
namespace {

Fault bug_fault(const std::exception& bug) {
    Fault fault;
    fault.found = bug.what();
    fault.wanted = "a step that ends";
    fault.remedy = "this is a bug of the program; the file is as it was before the step";
    return fault;
}

} // namespace

double Desk::running_seconds() const {
    return running_ ? double(QDateTime::currentMSecsSinceEpoch() - started_ms_) / 1000.0 : 0.0;
}

void Desk::start(Step step, std::function<StepEnd(const Progress&)> work) {
    running_ = step;
    running_frac_ = 0;
    started_ms_ = QDateTime::currentMSecsSinceEpoch();
    cancel_ = false;
    Progress progress;
    progress.cancel = &cancel_;
    progress.on_progress = [this](double done_frac) {
        QMetaObject::invokeMethod(
            this,
            [this, done_frac] {
                if (!running_ || done_frac < running_frac_) return;
                running_frac_ = std::min(done_frac, 1.0);
                Q_EMIT step_changed();
            },
            Qt::QueuedConnection);
    };
    Q_EMIT step_changed();
    watcher_.setFuture(QtConcurrent::run([work = std::move(work), progress]() -> StepEnd {
        try {
            return work(progress);
        } catch (const std::exception& bug) {
            return {bug_fault(bug), {}};
        }
    }));
}

void Desk::run(Step step) {
    if (!may_edit()) return;
    start(step, [run = link_.run_step, step](const Progress& progress) -> StepEnd {
        const auto done = run(step, progress);
        if (done) return {};
        return {done.error(), {}};
    });
}

void Desk::set_errors_aside() {
    if (!may_edit()) return;
    start(Step::vet, [set_aside = link_.set_aside](const Progress& progress) -> StepEnd {
        const auto done = set_aside(progress);
        if (done) return {};
        return {done.error(), {}};
    });
}

void Desk::hand_out(const HandOutOptions& options) {
    if (is_running() || !is_open()) return;
    start(Step::hand_out, [write = link_.hand_out, options](const Progress& progress) -> StepEnd {
        auto files = write(options, progress);
        if (!files) return {files.error(), {}};
        return {std::nullopt, std::move(*files)};
    });
}

void Desk::cancel() {
    if (!running_) return;
    cancel_ = true;
    say(tr("Stopping %1 ...").arg(step_word(*running_)));
}

void Desk::finish_step() {
    const StepEnd end = watcher_.result();
    const Step step = *running_;
    const double seconds = running_seconds();
    const Plan before = view().plan;
    running_.reset();
    running_frac_ = 0;
    take_view();
    Q_EMIT step_changed();
    if (end.fault) {
        const bool by_user = end.fault->code == FaultCode::cancelled;
        say(by_user ? tr("%1 stopped. The file is as it was before.").arg(step_word(step))
                    : to_q(fault_text(*end.fault)),
            !by_user);
        return;
    }
    if (step == Step::hand_out) {
        QStringList files;
        for (const std::string& file : end.files) files << to_q(file);
        say(tr("Handed out: %1 written.").arg(count_text(files.size(), tr("file"), tr("files"))));
        Q_EMIT handed_out(files);
        return;
    }
    say(tr("%1 took %2 s. %3").arg(step_word(step), number_text(seconds, 1), what_changed(before)));
}

QString Desk::what_changed(const Plan& before) const {
    const Plan& now = view().plan;
    if (before.poles.size() != now.poles.size()) return {};
    long choices = 0, years = 0;
    for (std::size_t i = 0; i < now.poles.size(); ++i) {
        if (before.poles[i].choice != now.poles[i].choice) ++choices;
        if (before.poles[i].year != now.poles[i].year) ++years;
    }
    QStringList parts;
    if (choices > 0) parts << tr("%1 with another choice").arg(count_text(choices, tr("pole"), tr("poles")));
    if (years > 0) parts << tr("%1 with another year").arg(count_text(years, tr("pole"), tr("poles")));
    return parts.isEmpty() ? tr("The plan is as it was.") : parts.join(", ") + '.';
}

} // namespace unstring
