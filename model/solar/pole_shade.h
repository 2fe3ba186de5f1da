#pragma once
// One pole under its own sky, with each head.

#include <vector>

#include "model/solar/city_light.h"
#include "model/solar/pole_horizon.h"
#include "model/solar/shade.h"

namespace unstring {

/// Room to work in, kept by a thread from pole to pole.
struct ShadeScratch {
    std::vector<float> through; ///< per step of the sun
    std::vector<double> yield;  ///< hours of all years * kLanes
    std::vector<float> soc;     ///< hours of the reported years * kLanes
};

[[nodiscard]] PoleShade shade_pole(const ShadeInput& input, const CityLight& light, const ShadeTerms& terms,
                                   PoleIx pole, const PoleHorizon& horizon, ShadeScratch& scratch);

} // namespace unstring
