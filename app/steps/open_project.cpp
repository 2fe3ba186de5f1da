#include "app/steps/open_project.h"

#include "app/steps/project_inside.h"
#include "geo/project/plan_tables.h"
#include "geo/project/schema.h"
#include "model/phase/phase_plan.h"

namespace unstring {

OpenProject::OpenProject() : inside_(std::make_unique<Inside>()) {}

OpenProject::~OpenProject() {
    if (inside_->database && inside_->lock) inside_->database->close_to_one_file();
    inside_->database.reset();
}

Expected<std::unique_ptr<OpenProject>> OpenProject::open(const std::string& path,
                                                         const std::string& plan_name, bool read_only) {
    std::unique_ptr<OpenProject> project(new OpenProject);
    Inside& inside = *project->inside_;
    inside.path = path;
    inside.read_only_reason = "opened to look only";
    if (auto known = check_version(path); !known) return tl::make_unexpected(known.error());
    if (!read_only) {
        auto lock = WriterLock::take(path);
        if (lock)
            inside.lock = std::move(*lock);
        else
            inside.read_only_reason = lock.error().found;
    }
    if (inside.lock)
        if (auto ready = bring_up_to_date(path); !ready) return tl::make_unexpected(ready.error());
    auto database = Database::open(path, inside.lock ? Database::Access::write : Database::Access::read);
    if (!database) return tl::make_unexpected(database.error());
    inside.database = std::move(*database);
    if (auto good = check_schema(*inside.database, path); !good) return tl::make_unexpected(good.error());
    if (auto loaded = inside.load(plan_name); !loaded) return tl::make_unexpected(loaded.error());
    inside.show();
    return project;
}

std::shared_ptr<const ProjectView> OpenProject::view() const {
    const std::lock_guard guard(inside_->view_mutex);
    return inside_->view;
}

Expected<Change> OpenProject::edit(const Plan& next, const std::string& label) {
    auto change = inside_->write_plan(next, label);
    if (change && !change->is_empty()) inside_->show();
    return change;
}

Expected<std::optional<Change>> OpenProject::undo() {
    return inside_->take_back(next_undo(*inside_->database, inside_->plan.settings.name));
}

Expected<std::optional<Change>> OpenProject::redo() {
    return inside_->take_back(next_redo(*inside_->database, inside_->plan.settings.name));
}

Expected<std::vector<EditLine>> OpenProject::history(const std::string& pole_id, int at_most) const {
    std::vector<EditLine> lines;
    for (const EditRecord& record :
         edits_of(*inside_->database, inside_->plan.settings.name, pole_id, at_most))
        lines.push_back({record.id, record.at, record.who, record.plan, record.label, record.undoes});
    if (const auto& failure = inside_->database->failure()) return tl::make_unexpected(*failure);
    return lines;
}

PhaseResult OpenProject::preview(const Plan& next) const {
    const auto now = view();
    if (!now->decide) return {};
    static const ShadeResult none;
    const std::lock_guard held(inside_->desk_mutex);
    if (inside_->desk_view != now) {
        inside_->desk = std::make_unique<PhaseDesk>(
            MoneyInput{now->city, now->catalog, now->prices, next, now->shade ? *now->shade : none},
            *now->decide);
        inside_->desk_view = now;
    }
    PhaseResult result = inside_->desk->evaluate(next, false);
    result.bound = now->phase ? now->phase->bound : 0;
    return result;
}

} // namespace unstring
