// What the window does with files: open, gather, hand out, drop, close.

#include <QCloseEvent>
#include <QDragEnterEvent>
#include <QDropEvent>
#include <QFileDialog>
#include <QFileInfo>
#include <QMimeData>
#include <QtConcurrentRun>

#include "app/window/hand_out_dialog.h"
#include "app/window/look/words.h"
#include "app/window/main_window.h"

namespace unstring {

bool MainWindow::open_path(const std::string& path) {
    if (desk_.is_running()) {
        desk_.say(tr("A step is running: cancel it, or wait for its end."), true);
        return false;
    }
    auto link = doors_.open(path);
    if (!link) {
        desk_.say(to_q(fault_text(link.error())), true);
        return false;
    }
    show_project(std::move(*link));
    return true;
}

void MainWindow::ask_open() {
    const QString path = QFileDialog::getOpenFileName(
        this, tr("Open a project"), QString(), tr("Unstring projects (*.unstring *.gpkg);;All files (*)"));
    if (!path.isEmpty()) open_path(path.toStdString());
}

void MainWindow::ask_gather() {
    GatherDialog dialog(desk_.is_open() ? to_q(desk_.view().path) : QString(), this);
    if (dialog.exec() == QDialog::Accepted) gather(dialog.wish());
}

void MainWindow::gather(const GatherWish& wish) {
    if (desk_.is_running() || gathering_.isRunning()) return;
    if (desk_.is_open()) desk_.close(); // the file must be free for gather to write it
    stop_gathering_ = false;
    Progress progress;
    progress.cancel = &stop_gathering_;
    desk_.say(tr("Reading the files ..."));
    gathering_.setFuture(QtConcurrent::run([gather = doors_.gather, wish, progress]() -> GatherEnd {
        try {
            auto notes = gather(wish, progress);
            if (!notes) return {notes.error(), {}, wish.project_path};
            return {std::nullopt, std::move(*notes), wish.project_path};
        } catch (const std::exception& bug) {
            Fault fault;
            fault.found = bug.what();
            fault.remedy = "this is a bug of the program; a project that was there is as it was";
            return {fault, {}, wish.project_path};
        }
    }));
}

void MainWindow::finish_gather() {
    const GatherEnd end = gathering_.result();
    const bool is_there = QFileInfo::exists(to_q(end.path));
    if (is_there) open_path(end.path);
    if (end.fault) {
        desk_.say(to_q(fault_text(*end.fault)), true);
        return;
    }
    QStringList lines;
    for (const std::string& note : end.notes) lines << to_q(note);
    desk_.say(tr("Gathered. %1").arg(lines.join(QStringLiteral("; "))));
}

void MainWindow::step_clicked(Step step) {
    if (desk_.is_running() || gathering_.isRunning()) return;
    if (step == Step::gather || step == Step::hand_out || !desk_.is_open()) return run_step(step);
    const StepState& state = desk_.view().steps[std::size_t(step)];
    const bool is_fresh = state.standing == StepStanding::up_to_date ||
                          state.standing == StepStanding::by_hand || state.standing == StepStanding::stopped;
    if (is_fresh && state.errors + state.warnings > 0) return show_side(Side::findings);
    desk_.run(step);
}

void MainWindow::run_step(Step step) {
    if (desk_.is_running() || gathering_.isRunning()) return;
    if (step == Step::gather || !desk_.is_open())
        ask_gather();
    else if (step == Step::hand_out)
        ask_hand_out();
    else
        desk_.run(step);
}

void MainWindow::ask_hand_out() {
    auto* dialog = new HandOutDialog(desk_.view(), this);
    dialog->setAttribute(Qt::WA_DeleteOnClose);
    connect(dialog, &QDialog::accepted, this, [this, dialog] { desk_.hand_out(dialog->options()); });
    dialog->open();
}

void MainWindow::dragEnterEvent(QDragEnterEvent* event) {
    if (event->mimeData()->hasUrls()) event->acceptProposedAction();
}

void MainWindow::dropEvent(QDropEvent* event) {
    const QList<QUrl> urls = event->mimeData()->urls();
    if (!urls.isEmpty() && urls.front().isLocalFile()) open_path(urls.front().toLocalFile().toStdString());
}

void MainWindow::closeEvent(QCloseEvent* event) {
    if (desk_.is_running())
        desk_.cancel(); // every edit is on disk already; a step that is cut leaves the file as it was
    event->accept();
}

} // namespace unstring
