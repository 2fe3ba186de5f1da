#pragma once
// What may be opened at all: ordinary files on this machine, of a bounded size. Nothing is fetched over a
// network.

#include <cstdint>
#include <string>

#include "model/fault.h"

namespace unstring {

/// @return the size in bytes of an ordinary local file
/// @fault file_missing (none there, no permission, a folder, a network or archive path), file_broken (over
/// max_bytes)
[[nodiscard]] Expected<std::uintmax_t> local_file_size(const std::string& path, std::uintmax_t max_bytes);

/// The whole content. @fault as local_file_size
[[nodiscard]] Expected<std::string> read_local_file(const std::string& path, std::uintmax_t max_bytes);

/// A hash of the whole content (XXH3, 128 bits, as 32 hexadecimal digits): changes when the content does.
[[nodiscard]] Expected<std::string> content_fingerprint(const std::string& path);

} // namespace unstring
