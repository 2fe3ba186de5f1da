#pragma once
// How GDAL is used here: listed drivers, local files, nothing fetched, errors as Faults and never on the
// console.

namespace unstring {

/// Registers drivers and closes the network; harmless to call often, from any thread.
void start_gdal();

/// The drivers that may open a raster, and a vector file; lists that end with null.
[[nodiscard]] const char* const* raster_drivers();
[[nodiscard]] const char* const* vector_drivers();

} // namespace unstring
