#include "model/vet/wiring_insert.h"

#include <algorithm>
#include <set>
#include <tuple>

namespace unstring {
namespace {

constexpr double kGain_m = 1e-7;
constexpr int kMostPasses = 50;
constexpr std::size_t kWindow = 16; // slots rearranged at once

class Insertion {
public:
    Insertion(const DistanceTable& distances, const std::vector<std::optional<int>>& numbers)
        : d_(distances) {
        std::vector<int> numbered;
        for (std::size_t stop = 1; stop < numbers.size(); ++stop)
            (numbers[stop] ? numbered : loose_).push_back(static_cast<int>(stop));
        std::stable_sort(numbered.begin(), numbered.end(), [&](int a, int b) {
            return *numbers[static_cast<std::size_t>(a)] < *numbers[static_cast<std::size_t>(b)];
        });
        order_ = {0};
        order_.insert(order_.end(), numbered.begin(), numbered.end());
        if (fills_gaps(numbers, numbered)) open_slots(numbers, numbered);
    }

    std::vector<int> run() {
        if (!slots_.empty())
            fill_slots();
        else
            insert_where_cheapest();
        return order_;
    }

private:
    /// Numbers from 1..n, all different, so that each stop without one belongs into one gap.
    [[nodiscard]] bool fills_gaps(const std::vector<std::optional<int>>& numbers,
                                  const std::vector<int>& numbered) const {
        std::set<int> seen;
        for (const int stop : numbered) seen.insert(*numbers[static_cast<std::size_t>(stop)]);
        const int lamps = static_cast<int>(numbered.size() + loose_.size());
        return !loose_.empty() && !seen.empty() && seen.size() == numbered.size() && *seen.begin() >= 1 &&
               *seen.rbegin() <= lamps;
    }

    void open_slots(const std::vector<std::optional<int>>& numbers, const std::vector<int>& numbered) {
        order_.assign(1 + numbered.size() + loose_.size(), -1);
        order_[0] = 0;
        for (const int stop : numbered)
            order_[static_cast<std::size_t>(*numbers[static_cast<std::size_t>(stop)])] = stop;
        for (std::size_t i = 1; i < order_.size(); ++i)
            if (order_[i] < 0) slots_.push_back(i);
    }

    [[nodiscard]] double d(int a, int b) const {
        return d_(static_cast<std::size_t>(a), static_cast<std::size_t>(b));
    }
    [[nodiscard]] int stop_at(std::size_t i) const { return order_[i == order_.size() ? 0 : i]; }

    /// The two legs of the stop at place i.
    [[nodiscard]] double detour_m(std::size_t i) const {
        return d(order_[i - 1], order_[i]) + d(order_[i], stop_at(i + 1));
    }

    /// Distance of a stop to where the slot should lie: between the numbered stops before and after it, by
    /// its share.
    [[nodiscard]] double misfit_m(std::size_t slot, int stop) const {
        std::size_t before = slot, after = slot;
        while (order_[before] < 0) --before;
        while (after < order_.size() && order_[after] < 0) ++after;
        const double share = static_cast<double>(slot - before) / static_cast<double>(after - before);
        return (1 - share) * d(order_[before], stop) + share * d(stop_at(after), stop);
    }

    /// The best fitting pairs of slot and stop first; then slots change places, turn round or shift while
    /// that shortens the loop.
    void fill_slots() {
        std::vector<std::tuple<double, std::size_t, int>> fits;
        for (const std::size_t slot : slots_)
            for (const int stop : loose_) fits.emplace_back(misfit_m(slot, stop), slot, stop);
        std::sort(fits.begin(), fits.end());
        std::set<int> placed;
        for (const auto& [misfit, slot, stop] : fits)
            if (order_[slot] < 0 && placed.insert(stop).second) order_[slot] = stop;
        bool is_better = true;
        for (int pass = 0; is_better && pass < kMostPasses; ++pass) {
            is_better = false;
            for (std::size_t x = 0; x < slots_.size(); ++x)
                for (std::size_t y = x + 1; y < std::min(slots_.size(), x + kWindow); ++y)
                    is_better = rearrange(x, y) || is_better;
        }
    }

    [[nodiscard]] double slots_m(std::size_t x, std::size_t y) const {
        double metres = 0;
        for (std::size_t k = x; k <= y; ++k) {
            metres += d(order_[slots_[k] - 1], order_[slots_[k]]);
            const bool leg_is_next_slots = k < y && slots_[k + 1] == slots_[k] + 1;
            if (!leg_is_next_slots) metres += d(order_[slots_[k]], stop_at(slots_[k] + 1));
        }
        return metres;
    }

    /// Tries the stops in slots x..y with their ends exchanged, turned round, and shifted by one either way.
    bool rearrange(std::size_t x, std::size_t y) {
        const double before_m = slots_m(x, y);
        std::vector<int> was;
        for (std::size_t k = x; k <= y; ++k) was.push_back(order_[slots_[k]]);
        const auto place = [&](const std::vector<int>& stops) {
            for (std::size_t k = x; k <= y; ++k) order_[slots_[k]] = stops[k - x];
        };
        for (int kind = 0; kind < 4; ++kind) {
            std::vector<int> stops = was;
            if (kind == 0) std::swap(stops.front(), stops.back());
            if (kind == 1) std::reverse(stops.begin(), stops.end());
            if (kind == 2) std::rotate(stops.begin(), stops.begin() + 1, stops.end());
            if (kind == 3) std::rotate(stops.begin(), stops.end() - 1, stops.end());
            place(stops);
            if (slots_m(x, y) < before_m - kGain_m) return true;
        }
        place(was);
        return false;
    }

    [[nodiscard]] std::pair<double, std::size_t> cheapest_place(int stop) const {
        std::pair<double, std::size_t> best{0, 0};
        for (std::size_t i = 1; i <= order_.size(); ++i) {
            const double longer_m =
                d(order_[i - 1], stop) + d(stop, stop_at(i)) - d(order_[i - 1], stop_at(i));
            if (best.second == 0 || longer_m < best.first - kGain_m) best = {longer_m, i};
        }
        return best;
    }

    void insert_where_cheapest() {
        std::vector<int> left = loose_;
        while (!left.empty()) {
            std::size_t pick = 0;
            std::pair<double, std::size_t> best{0, 0};
            for (std::size_t k = 0; k < left.size(); ++k) {
                const auto place = cheapest_place(left[k]);
                if (best.second != 0 && place.first >= best.first - kGain_m) continue;
                best = place;
                pick = k;
            }
            order_.insert(order_.begin() + static_cast<long>(best.second), left[pick]);
            left.erase(left.begin() + static_cast<long>(pick));
        }
        bool is_better = true;
        for (int pass = 0; is_better && pass < kMostPasses; ++pass) {
            is_better = false;
            for (const int stop : loose_) is_better = move_loose(stop) || is_better;
        }
    }

    bool move_loose(int stop) {
        const auto at =
            static_cast<std::size_t>(std::find(order_.begin(), order_.end(), stop) - order_.begin());
        const double freed_m = detour_m(at) - d(order_[at - 1], stop_at(at + 1));
        order_.erase(order_.begin() + static_cast<long>(at));
        const auto place = cheapest_place(stop);
        const bool is_better = place.first < freed_m - kGain_m;
        order_.insert(order_.begin() + static_cast<long>(is_better ? place.second : at), stop);
        return is_better;
    }

    const DistanceTable& d_;
    std::vector<int> order_, loose_;
    std::vector<std::size_t> slots_; ///< places in order_ that the numbering leaves open
};

} // namespace

std::vector<int> insert_unnumbered(const DistanceTable& distances,
                                   const std::vector<std::optional<int>>& numbers) {
    return Insertion(distances, numbers).run();
}

} // namespace unstring
