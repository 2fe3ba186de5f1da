#pragma once
// asbuilt.csv: what a crew found and did. In this version it is read, checked and compared; the records stay
// as they are.

#include "geo/imports/read_records.h"

namespace unstring {

/// `reading-differs` where amperes, volts, wiring order or duct are not what the records say, `pole-unknown`
/// for poles that are not there. Call after the references are settled.
Expected<void> read_asbuilt(const ReadyTable& from, Gathered& out);

} // namespace unstring
