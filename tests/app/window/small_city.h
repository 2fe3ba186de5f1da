#pragma once
// A hand-made city of three strings for the window's tests: no file, no solver; what phase would say is
// counted here.

#include <memory>
#include <string>
#include <vector>

#include "app/window/main_window.h"

namespace unstring::test {

struct SmallCity {
    std::shared_ptr<const ProjectView> view;
    std::vector<std::shared_ptr<const ProjectView>> before; ///< undo
    std::vector<std::shared_ptr<const ProjectView>> after;  ///< redo
    std::vector<std::string> labels;                        ///< of every edit, oldest first
    std::vector<EditLine> history;
    int previews = 0;
    std::atomic<int> steps_ended = 0, steps_cancelled = 0;
    std::vector<HandOutOptions> handed_out;
};

/// Strings "S-01" of 12 lamps with cut-backs, "S-02" of 25 without, "Longford Avenue North (1938)" of 60;
/// five parallel poles, one pole down. Decided, phased in 2027..2031.
[[nodiscard]] std::shared_ptr<ProjectView> small_view();
[[nodiscard]] std::shared_ptr<SmallCity> small_city(std::shared_ptr<ProjectView> view = small_view());
[[nodiscard]] ProjectLink link_to(const std::shared_ptr<SmallCity>& city);
/// Counts lamps, a load of 0.3 kVA a lamp, 4 000 dollars and 6 line hours a pole.
[[nodiscard]] PhaseResult counted_phase(const ProjectView& view, const Plan& plan);

/// Doors that open nothing.
[[nodiscard]] Doors closed_doors();
/// Lets queued events and timers run for a while.
void settle(int ms = 30);
/// Saves a picture of a widget under the build's artefacts, at a device pixel ratio; gives its path.
std::string save_picture(QWidget& widget, const std::string& name, double ratio = 1);
/// Part of the pixels that differ from the corner's colour: 0 = nothing is drawn.
[[nodiscard]] double drawn_frac(QWidget& widget);

} // namespace unstring::test
