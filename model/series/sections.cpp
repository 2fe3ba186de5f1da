#include "model/series/sections.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace unstring {
namespace {

constexpr int kUsualLamps = 8; // sections of about 6 to 10 lamps
constexpr int kMostLamps = 11; // eleven are one section: two would be under six

/// A run of lamps that is off: positions first .. last.
struct Run {
    int first = 0, last = -1;
    int cutback = -1; ///< closes the loop around it
    [[nodiscard]] int lamps() const { return last - first + 1; }
};

/// How far a ring of so many lamps is from the usual size; nothing for 6 to 11, and for what must be cut into
/// such pieces.
double size_cost(int lamps) {
    const int pieces = std::max(1, (lamps + kMostLamps - 1) / kMostLamps);
    const double each = static_cast<double>(lamps) / pieces;
    const double off = std::max(0.0, 6 - each);
    return off * off / 6 + (pieces - 1) * 1.5; // a cut that no cut-back serves leaves live cable behind
}

/// A splice has its price, an unconfirmed one its doubt.
double cutback_cost(const LoopCutBack& cutback) {
    return (cutback.confirmed ? 0.2 : 0.5) + cutback.new_cable_m / 100 +
           (cutback.kind == CutBackKind::crossing ? 0.3 : 0);
}

double skipped_m(const StringLoop& loop, const LoopCutBack& cutback) {
    double metres = 0;
    for (int leg = cutback.a; leg < cutback.b; ++leg) metres += loop.legs_m[static_cast<std::size_t>(leg)];
    return metres;
}

/// Runs that a cut-back closes and that hold the far end, small to large.
std::vector<Run> closable_runs(const StringLoop& loop) {
    std::vector<Run> runs;
    for (std::size_t k = 0; k < loop.cutbacks.size(); ++k) {
        const LoopCutBack& cutback = loop.cutbacks[k];
        const bool holds_far_end = cutback.a < loop.far_position && loop.far_position < cutback.b;
        if (holds_far_end && cutback.new_cable_m < skipped_m(loop, cutback) - 1e-9)
            runs.push_back({cutback.a + 1, cutback.b - 1, static_cast<int>(k)});
    }
    std::sort(runs.begin(), runs.end(), [](const Run& a, const Run& b) {
        return a.lamps() != b.lamps() ? a.lamps() < b.lamps() : a.cutback < b.cutback;
    });
    return runs;
}

/// The chain of nested runs, from the far end to the whole string, whose rings have the best sizes: shortest
/// path over the runs by size, exact.
std::vector<Run> best_chain(const StringLoop& loop) {
    std::vector<Run> runs = closable_runs(loop);
    const Run whole{1, static_cast<int>(loop.lamps.size()), -1};
    std::erase_if(runs, [&](const Run& run) { return run.lamps() == whole.lamps(); });
    runs.push_back(whole);
    std::vector<double> cost(runs.size(), 0);
    std::vector<int> inner(runs.size(), -1);
    for (std::size_t r = 0; r < runs.size(); ++r) {
        cost[r] = size_cost(runs[r].lamps());
        for (std::size_t q = 0; q < r; ++q) {
            const bool is_nested = runs[r].first <= runs[q].first && runs[q].last <= runs[r].last;
            if (!is_nested || runs[q].lamps() == runs[r].lamps()) continue;
            const double with_inner = cost[q] + size_cost(runs[r].lamps() - runs[q].lamps());
            if (with_inner >= cost[r] - 1e-9) continue;
            cost[r] = with_inner;
            inner[r] = static_cast<int>(q);
        }
        if (runs[r].cutback >= 0)
            cost[r] += cutback_cost(loop.cutbacks[static_cast<std::size_t>(runs[r].cutback)]);
    }
    std::vector<Run> chain;
    for (int r = static_cast<int>(runs.size()) - 1; r >= 0; r = inner[static_cast<std::size_t>(r)])
        chain.push_back(runs[static_cast<std::size_t>(r)]);
    std::reverse(chain.begin(), chain.end());
    return chain;
}

int pieces_of(int lamps) {
    return std::max(1, static_cast<int>(std::lround(static_cast<double>(lamps) / kUsualLamps)));
}

/// Grows `off` to `goal` in even pieces, on both sides at once.
void grow_both_sides(Run off, const Run& goal, std::vector<Run>& out) {
    const int left = off.first - goal.first, right = goal.last - off.last;
    const int pieces = left + right <= kMostLamps ? 1 : pieces_of(left + right);
    const Run from = off;
    for (int k = 1; k <= pieces; ++k) {
        off.first = from.first - left * k / pieces;
        off.last = from.last + right * k / pieces;
        off.cutback = k == pieces ? goal.cutback : -1;
        out.push_back(off);
    }
}

/// A run with nothing off yet, in contiguous blocks: the one at the far end first, then always the neighbour
/// block that lies farther from the station.
void grow_by_blocks(const StringLoop& loop, const Run& goal, std::vector<Run>& out) {
    const int blocks = goal.lamps() <= kMostLamps ? 1 : pieces_of(goal.lamps());
    const auto block_start = [&](int k) { return goal.first + goal.lamps() * k / blocks; };
    int low = 0;
    while (low + 1 < blocks && block_start(low + 1) <= loop.far_position) ++low;
    int high = low + 1;
    Run off{block_start(low), block_start(high) - 1, -1};
    out.push_back(off);
    std::vector<double> out_m{0};
    for (const double leg_m : loop.legs_m) out_m.push_back(out_m.back() + leg_m);
    while (low > 0 || high < blocks) {
        const double left_m = low > 0 ? out_m[static_cast<std::size_t>(off.first - 1)] : -1;
        const double right_m =
            high < blocks ? out_m.back() - out_m[static_cast<std::size_t>(off.last + 1)] : -1;
        if (left_m >= right_m)
            off.first = block_start(--low);
        else
            off.last = block_start(++high) - 1;
        out.push_back(off);
    }
    out.back().cutback = goal.cutback;
}

std::vector<Run> growing_runs(const StringLoop& loop) {
    std::vector<Run> off;
    for (const Run& goal : best_chain(loop)) {
        if (off.empty())
            grow_by_blocks(loop, goal, off);
        else
            grow_both_sides(off.back(), goal, off);
    }
    return off;
}

} // namespace

std::vector<Section> sections_of(const std::vector<StringLoop>& loops) {
    std::vector<Section> sections;
    for (const StringLoop& loop : loops) {
        if (loop.lamps.empty()) continue;
        Run before{loop.far_position, loop.far_position - 1, -1};
        int ring = 0;
        for (const Run& off : growing_runs(loop)) {
            Section section;
            section.id = static_cast<int>(sections.size());
            section.string = loop.string;
            section.ring = ring++;
            section.cutback = off.cutback;
            for (int p = off.first; p <= off.last; ++p)
                if (p < before.first || p > before.last)
                    section.poles.push_back(loop.lamps[static_cast<std::size_t>(p - 1)]);
            sections.push_back(std::move(section));
            before = off;
        }
    }
    return sections;
}

} // namespace unstring
