#pragma once
// One coordinate system for the project, in metres, from whatever the files bring.

#include <string>
#include <vector>

#include "geo/ground/raster_file.h"
#include "geo/imports/gathered.h"
#include "geo/imports/read_records.h"

namespace unstring {

/// Settles the system of the project and of every table that does not say its own:
/// the user's where given; else that of the poles' file; else degrees by the look of the numbers; else that
/// of another file of the same call that lies at the same place. Systems in degrees, feet, or out of scale
/// give way to one in metres.
/// @param tables  their `placed.crs` is filled where it is empty
/// @param raster  of the canopy, or null
/// @fault crs_unknown, bad_usage (--crs)
Expected<void> settle_crs(const GatherFiles& files, std::vector<ReadyTable*> tables,
                          const RasterFacts* raster, Gathered& out);

/// `place-swapped` for a table whose x and y, or single rows of it, are the wrong way round: told by degrees
/// beyond 90, and by the area that the system is made for.
void say_swapped(const ReadyTable& table, Gathered& out);

/// Centre, convergence; nothing where no pole has a place.
Expected<void> settle_centre(City& city);

} // namespace unstring
