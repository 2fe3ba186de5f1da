#include "model/series/route_search.h"

#include <algorithm>
#include <array>
#include <deque>
#include <numeric>
#include <random>

namespace unstring {
namespace {

constexpr int kNeighbours = 10;
constexpr int kLongestSegment = 3; // Or-opt
constexpr int kBridgeSpan = 30;    // stops in one part of a local double bridge
constexpr double kGain_m = 1e-7;   // smaller gains are rounding and could go round in a circle

class TourSearch {
public:
    explicit TourSearch(const DistanceTable& distances)
        : d_(distances), n_(static_cast<int>(distances.stops())) {
        list_neighbours();
        start_at_nearest();
    }

    std::vector<int> run(const RouteEffort& effort) {
        for (int stop = 0; stop < n_; ++stop) wake(tour_[at(stop)]);
        improve();
        std::mt19937_64 random(effort.seed);
        const int rounds = effort.rounds >= 0 ? effort.rounds : std::min(200 * n_, 30000);
        std::vector<int> best = tour_;
        for (int round = 0; round < rounds && n_ >= 8; ++round) {
            gained_m_ = 0;
            double_bridge(random);
            improve();
            if (gained_m_ < -kGain_m)
                restore(best);
            else
                best = tour_; // of equals the new one, so that the next round starts elsewhere
        }
        std::rotate(best.begin(), std::find(best.begin(), best.end(), 0), best.end());
        if (best[1] > best.back()) std::reverse(best.begin() + 1, best.end());
        return best;
    }

private:
    static std::size_t at(int i) { return static_cast<std::size_t>(i); }
    [[nodiscard]] double d(int a, int b) const { return d_(at(a), at(b)); }
    [[nodiscard]] int next(int stop) const {
        return tour_[at(place_[at(stop)] + 1 == n_ ? 0 : place_[at(stop)] + 1)];
    }
    [[nodiscard]] int prev(int stop) const {
        return tour_[at(place_[at(stop)] == 0 ? n_ - 1 : place_[at(stop)] - 1)];
    }
    [[nodiscard]] int step(int stop, bool forward) const { return forward ? next(stop) : prev(stop); }

    void list_neighbours() {
        const int count = std::min(kNeighbours, n_ - 1);
        near_.resize(at(n_));
        std::vector<int> all;
        for (int a = 0; a < n_; ++a) {
            all.clear();
            for (int b = 0; b < n_; ++b)
                if (b != a) all.push_back(b);
            const auto closer = [&](int x, int y) { return d(a, x) != d(a, y) ? d(a, x) < d(a, y) : x < y; };
            std::partial_sort(all.begin(), all.begin() + count, all.end(), closer);
            near_[at(a)].assign(all.begin(), all.begin() + count);
        }
    }

    void start_at_nearest() {
        std::vector<char> is_in(at(n_), 0);
        tour_ = {0};
        is_in[0] = 1;
        while (static_cast<int>(tour_.size()) < n_) {
            int nearest = -1;
            for (int b = 0; b < n_; ++b)
                if (is_in[at(b)] == 0 && (nearest < 0 || d(tour_.back(), b) < d(tour_.back(), nearest)))
                    nearest = b;
            tour_.push_back(nearest);
            is_in[at(nearest)] = 1;
        }
        restore(tour_);
        is_awake_.assign(at(n_), 0);
    }

    void restore(const std::vector<int>& tour) {
        tour_ = tour;
        place_.resize(at(n_));
        for (int i = 0; i < n_; ++i) place_[at(tour_[at(i)])] = i;
    }

    void wake(int stop) {
        if (is_awake_[at(stop)] != 0) return;
        is_awake_[at(stop)] = 1;
        queue_.push_back(stop);
    }

    void improve() {
        while (!queue_.empty()) {
            const int stop = queue_.front();
            queue_.pop_front();
            is_awake_[at(stop)] = 0;
            while (two_opt(stop) || or_opt(stop)) {
            }
        }
    }

    /// Turns round the way from place i forward to place j (or the rest of the tour, which is the same tour).
    void reverse_between(int i, int j) {
        int length = (j - i + n_) % n_ + 1;
        if (2 * length > n_) {
            std::swap(i, j);
            i = (i + 1) % n_;
            j = (j - 1 + n_) % n_;
            length = n_ - length;
        }
        for (int k = 0; k < length / 2; ++k) {
            std::swap(tour_[at(i)], tour_[at(j)]);
            place_[at(tour_[at(i)])] = i;
            place_[at(tour_[at(j)])] = j;
            i = i + 1 == n_ ? 0 : i + 1;
            j = j == 0 ? n_ - 1 : j - 1;
        }
    }

    bool two_opt(int a) {
        for (const bool forward : {true, false}) {
            const int b = step(a, forward);
            for (const int c : near_[at(a)]) {
                if (d(a, c) >= d(a, b)) break;
                const int e = step(c, forward);
                const double gain_m = d(a, b) + d(c, e) - d(a, c) - d(b, e);
                if (gain_m <= kGain_m) continue;
                if (forward)
                    reverse_between(place_[at(b)], place_[at(c)]);
                else
                    reverse_between(place_[at(c)], place_[at(b)]);
                gained_m_ += gain_m;
                for (const int stop : {a, b, c, e}) wake(stop);
                return true;
            }
        }
        return false;
    }

    /// Moves the one to three stops from `head` on to a place where head lies beside one of its neighbours.
    bool or_opt(int head) {
        for (const bool forward : {true, false}) {
            std::array<int, kLongestSegment> segment{head, head, head};
            for (int length = 1; length <= kLongestSegment && length + 3 <= n_; ++length) {
                if (length > 1) segment[at(length - 1)] = step(segment[at(length - 2)], forward);
                if (move_segment(std::span(segment.data(), at(length)), forward)) return true;
            }
        }
        return false;
    }

    bool move_segment(std::span<const int> segment, bool forward) {
        const int head = segment.front(), tail = segment.back();
        const int before = step(head, !forward), after = step(tail, forward);
        const double freed_m = d(before, head) + d(tail, after) - d(before, after);
        const auto is_in = [&](int stop) {
            return std::find(segment.begin(), segment.end(), stop) != segment.end();
        };
        for (const int c : near_[at(head)]) {
            if (d(c, head) >= freed_m) break;
            if (is_in(c)) continue;
            for (const bool beyond : {true, false}) {
                const int e = step(c, beyond);
                if (is_in(e)) continue;
                const double gain_m = freed_m - d(c, head) - d(tail, e) + d(c, e);
                if (gain_m <= kGain_m) continue;
                insert_segment(segment, c, e, beyond);
                gained_m_ += gain_m;
                for (const int stop : {before, after, head, tail, c, e}) wake(stop);
                return true;
            }
        }
        return false;
    }

    /// The tour without the segment, with it again between c and e, its head beside c. @param beyond  e
    /// follows c
    void insert_segment(std::span<const int> segment, int c, int e, bool beyond) {
        std::vector<int> moved;
        moved.reserve(tour_.size());
        const int first = beyond ? c : e;
        for (const int stop : tour_) {
            if (std::find(segment.begin(), segment.end(), stop) != segment.end()) continue;
            moved.push_back(stop);
            if (stop != first) continue;
            if (beyond)
                moved.insert(moved.end(), segment.begin(), segment.end());
            else
                moved.insert(moved.end(), segment.rbegin(), segment.rend());
        }
        restore(moved);
    }

    /// Swaps two neighbouring parts of the tour, at a random place: the move that neither 2-opt nor Or-opt
    /// can undo at once.
    void double_bridge(std::mt19937_64& random) {
        const auto below = [&](int limit) {
            return static_cast<int>(random() % static_cast<std::uint64_t>(limit));
        };
        const int span = std::min(kBridgeSpan, (n_ - 2) / 2);
        const int start = below(n_), left = 1 + below(span), right = 1 + below(span);
        std::vector<int> part;
        for (int k = 0; k < left + right; ++k)
            part.push_back(tour_[at((start + 1 + (left + k) % (left + right)) % n_)]);
        const int before = tour_[at(start)], after = tour_[at((start + 1 + left + right) % n_)];
        const int old_first = tour_[at((start + 1) % n_)], old_left_end = tour_[at((start + left) % n_)];
        const int old_right = tour_[at((start + left + 1) % n_)],
                  old_last = tour_[at((start + left + right) % n_)];
        gained_m_ += d(before, old_first) + d(old_left_end, old_right) + d(old_last, after);
        gained_m_ -= d(before, old_right) + d(old_last, old_first) + d(old_left_end, after);
        for (int k = 0; k < left + right; ++k) {
            const int place = (start + 1 + k) % n_;
            tour_[at(place)] = part[at(k)];
            place_[at(part[at(k)])] = place;
        }
        for (const int stop : {before, after, old_first, old_left_end, old_right, old_last}) wake(stop);
    }

    const DistanceTable& d_;
    int n_;
    std::vector<std::vector<int>> near_;
    std::vector<int> tour_, place_;
    std::vector<char> is_awake_;
    std::deque<int> queue_;
    double gained_m_ = 0;
};

} // namespace

std::vector<int> searched_tour(const DistanceTable& distances, const RouteEffort& effort) {
    return TourSearch(distances).run(effort);
}

} // namespace unstring
