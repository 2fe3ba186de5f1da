#pragma once
// How a long step says how far it is, and learns that it should stop.

#include <atomic>
#include <functional>

namespace unstring {

struct Progress {
    /// Called from the working thread with 0..1; may be empty.
    std::function<void(double done_frac)> on_progress;
    /// Set by the user; may be null.
    const std::atomic<bool>* cancel = nullptr;

    [[nodiscard]] bool is_cancelled() const {
        return cancel != nullptr && cancel->load(std::memory_order_relaxed);
    }
    void at(double done_frac) const {
        if (on_progress) on_progress(done_frac);
    }
};

} // namespace unstring
