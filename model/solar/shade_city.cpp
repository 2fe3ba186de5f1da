#include "model/solar/shade_city.h"

#include <atomic>
#include <chrono>
#include <utility>

#include <tbb/enumerable_thread_specific.h>
#include <tbb/parallel_for.h>

#include "model/solar/pole_shade.h"

namespace unstring {
namespace {

constexpr double kHorizonShare = 0.2; // of the progress bar

std::vector<PoleIx> candidates(const City& city) {
    std::vector<PoleIx> poles;
    for (std::size_t i = 0; i < city.poles.size(); ++i)
        if (is_candidate(city, city.poles[i])) poles.push_back(PoleIx(i));
    return poles;
}

Fault cancelled() { return {FaultCode::cancelled, {}, 0, {}, {}, {}, "nothing was changed"}; }

/// Progress that may be told from several threads and speaks from one at a time.
class SharedProgress {
public:
    SharedProgress(const Progress& progress, std::size_t all) : progress_(progress), all_(all) {}
    void one_done() {
        const std::size_t done = ++done_;
        if (is_speaking_.test_and_set(std::memory_order_acquire)) return;
        progress_.at(kHorizonShare +
                     (1.0 - kHorizonShare) * static_cast<double>(done) / static_cast<double>(all_));
        is_speaking_.clear(std::memory_order_release);
    }

private:
    const Progress& progress_;
    std::size_t all_;
    std::atomic<std::size_t> done_{0};
    std::atomic_flag is_speaking_ = ATOMIC_FLAG_INIT;
};

} // namespace

Expected<ShadeResult> shade_city(const ShadeInput& input, const Progress& progress) {
    const auto start = std::chrono::steady_clock::now();
    const ShadeTerms terms;
    const auto light = city_light(input, terms);
    if (!light) return tl::unexpected(light.error());
    const std::vector<PoleIx> poles = candidates(input.city);

    const Progress scanning{[&](double done_frac) { progress.at(done_frac * kHorizonShare); },
                            progress.cancel};
    const auto horizons = pole_horizons(input.city, poles, input.heights, scanning);
    if (!horizons) return tl::unexpected(horizons.error());

    ShadeResult result;
    result.poles.resize(poles.size());
    SharedProgress shared(progress, poles.size());
    tbb::enumerable_thread_specific<ShadeScratch> scratches;
    tbb::parallel_for(std::size_t{0}, poles.size(), [&](std::size_t i) {
        if (progress.is_cancelled()) return;
        result.poles[i] = shade_pole(input, *light, terms, poles[i], (*horizons)[i], scratches.local());
        shared.one_done();
    });
    if (progress.is_cancelled()) return tl::unexpected(cancelled());
    result.seconds = std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
    return result;
}

} // namespace unstring
