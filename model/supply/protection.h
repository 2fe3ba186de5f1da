#pragma once
// Overcurrent devices and grounding wires of a lighting circuit, in the general words of the electrical code;
// the local code and a licensed electrician decide.

#include <span>

#include "model/catalog/catalog.h"

namespace unstring {

/// Standard device ratings [A], rising. Source: NFPA 70, 240.6(A); above 100 A from memory.
[[nodiscard]] std::span<const int> device_steps();

/// Smallest standard device for a continuous current: at least 125 % of it; 0 where none of the list is
/// enough. Source: NFPA 70, 210.20(A) and 215.3, from memory.
[[nodiscard]] int device_for(double continuous_a);

/// Largest standard device that may protect the cable: its 75 C ampacity, the next step up where that lies
/// between two (240.4(B)), at most 15, 20, 30 A for copper 14, 12, 10 and 15, 25 A for aluminium 12, 10
/// (240.4(D)). 0 = none.
[[nodiscard]] int largest_device(const Cable& cable);

/// Copper equipment grounding wire for a device: 14 to 15 A, 12 to 20, 10 to 60, 8 to 100, 6 to 200, 4 above.
/// Source: NFPA 70, table 250.122, from memory.
[[nodiscard]] int grounding_awg(int device_a);

/// The same, made larger in proportion where the phase wire is larger than the device asks (250.122(B), from
/// memory).
/// @param needed  the smallest phase conductor that the device allows  @param chosen  what is pulled
[[nodiscard]] int grounding_awg_upsized(int device_a, const Cable& needed, const Cable& chosen);

} // namespace unstring
