#pragma once
// The planner's desk: what is open, looked at, chosen and under the hand, and the one place from which edits
// and steps start. Comes in: a ProjectLink. Goes out: signals; widgets read the desk and never write the plan
// themselves.

#include <QFutureWatcher>
#include <QObject>

#include <atomic>
#include <memory>
#include <optional>

#include "app/window/look/look.h"
#include "app/window/project_link.h"
#include "app/window/scene.h"

namespace unstring {

class Desk : public QObject {
    Q_OBJECT
public:
    explicit Desk(QObject* parent = nullptr);
    ~Desk() override;

    void open(ProjectLink link);
    /// Lets the project go, so that its file is free; nothing is open then.
    void close();
    [[nodiscard]] bool is_open() const { return scene_ != nullptr; }
    [[nodiscard]] const ProjectView& view() const { return *scene_->view; }
    [[nodiscard]] const Scene& scene() const { return *scene_; }
    /// The plan and phase's answer as shown: of the boundary under the hand while there is one.
    [[nodiscard]] const Plan& plan() const { return preview_ ? preview_->plan : view().plan; }
    [[nodiscard]] const PhaseResult* phase() const;
    [[nodiscard]] bool has_preview() const { return preview_.has_value(); }

    [[nodiscard]] const Look& look() const { return is_night_ ? night_look() : day_look(); }
    void set_night(bool is_night);

    [[nodiscard]] const std::vector<PoleIx>& selection() const { return selection_; }
    [[nodiscard]] bool is_selected(PoleIx pole) const;
    void select(std::vector<PoleIx> poles);
    /// The next lamp along the string of the pole chosen last. @param by  +1 towards the return terminal, -1
    /// back
    void walk(int by);
    [[nodiscard]] StringIx chosen_string() const { return string_; }
    void choose_string(StringIx string);

    /// Calendar year looked at; first_year - 1 = today.
    [[nodiscard]] int year() const { return year_; }
    void set_year(int year);

    // Edits of the selection; each is one line of the history.
    void mark(Choice choice);
    void lock();
    void clear_marks();
    void set_work_year(int year);
    void toggle_year_lock();
    void undo();
    void redo();

    // A plan under the hand.
    void show_preview(Plan next);
    void drop_preview();
    void write_preview(const QString& label);

    // Steps.
    [[nodiscard]] bool is_running() const { return running_.has_value(); }
    [[nodiscard]] std::optional<Step> running_step() const { return running_; }
    [[nodiscard]] double running_frac() const { return running_frac_; }
    [[nodiscard]] double running_seconds() const;
    void run(Step step);
    /// vet again, with the records of its errors set aside: they are in no plan until they are mended.
    void set_errors_aside();
    void hand_out(const HandOutOptions& options);
    void cancel();

    [[nodiscard]] std::vector<EditLine> history(const std::string& pole_id, int at_most) const;
    /// Shows a finding's record on the map and in the card; false when no record of that name is known.
    bool jump_to(const std::string& record);
    void say(const QString& words, bool is_trouble = false) { Q_EMIT said(words, is_trouble); }

Q_SIGNALS:
    void view_changed();
    void closed();
    void selection_changed();
    void year_changed();
    void preview_changed();
    void look_changed();
    void step_changed();
    void said(const QString& words, bool is_trouble);
    void show_place(MapPoint place);
    void handed_out(const QStringList& files);

private:
    struct Preview {
        Plan plan;
        PhaseResult phase;
    };
    struct StepEnd {
        std::optional<Fault> fault;
        std::vector<std::string> files;
    };

    void take_view();
    bool may_edit();
    bool write(const Plan& next, const QString& label);
    [[nodiscard]] std::vector<PoleIx> selected_candidates();
    [[nodiscard]] QString selection_words(const std::vector<PoleIx>& poles) const;
    void start(Step step, std::function<StepEnd(const Progress&)> work);
    void finish_step();
    [[nodiscard]] QString what_changed(const Plan& before) const;

    ProjectLink link_;
    std::shared_ptr<const Scene> scene_;
    std::optional<Preview> preview_;
    bool is_night_ = false;
    std::vector<PoleIx> selection_;
    std::vector<char> selected_;
    StringIx string_;
    int year_ = 0;

    std::optional<Step> running_;
    double running_frac_ = 0;
    std::int64_t started_ms_ = 0;
    std::atomic<bool> cancel_ = false;
    QFutureWatcher<StepEnd> watcher_;
};

} // namespace unstring
