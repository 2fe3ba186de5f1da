#pragma once
// One tile of the town as rows: poles, strings, transformers, cut-backs, services.

#include "sampledata/records.h"
#include "sampledata/route.h"

namespace unstring::sample {

/// Everything of one tile, at most `poles_left` poles. Ids are unique over all tiles of a town.
[[nodiscard]] Tables tile_of(const Town& town, int tile_x, int tile_y, long poles_left);

/// The poles of one circuit in walking order, without the odd ones out (see apply_oddities).
[[nodiscard]] std::vector<PoleRow> poles_along(const Town& town, const Route& route,
                                               const std::vector<Lamp>& lamps, int district);
/// Poles down, not ours, proposed; attachments; owners; heritage: a few of each.
void apply_oddities(const Town& town, int district_number, bool is_series, std::vector<PoleRow>& poles);

/// Conductor metres from the station over the lamps and back, laid along kerbs.
[[nodiscard]] double loop_m(MapPoint station, const std::vector<PoleRow>& poles);
/// Phasor sum of lamps and cable at 6.6 A.
[[nodiscard]] double load_kva(const std::vector<PoleRow>& poles, int cable_awg, double length_m);

/// Transformers for the strings of a tile: the smallest rating that still carries 1.1 times today's lamps;
/// S-01 and S-02 share a two-loop unit; four spares.
void add_units(const Town& town, int tile, Tables& tables);
void add_services(const Town& town, int tile, Tables& tables);

} // namespace unstring::sample
