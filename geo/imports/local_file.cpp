#include "geo/imports/local_file.h"

#include <filesystem>
#include <fstream>
#include <memory>
#include <system_error>
#include <vector>

#include <fmt/format.h>

#define XXH_INLINE_ALL
#include <xxhash.h>

namespace unstring {
namespace {

bool is_outside_path(const std::string& path) {
    // Prefixes by which GDAL would leave the local disk, and URLs.
    return path.starts_with("/vsi") || path.find("://") != std::string::npos;
}

Fault missing(const std::string& path, std::string found, std::string remedy) {
    return {FaultCode::file_missing, path, 0, {}, std::move(found), "a readable file on this machine",
            std::move(remedy)};
}

} // namespace

Expected<std::uintmax_t> local_file_size(const std::string& path, std::uintmax_t max_bytes) {
    if (is_outside_path(path))
        return tl::unexpected(
            missing(path, "a network or archive path", "copy the file to this machine first"));
    std::error_code error;
    const auto status = std::filesystem::status(path, error);
    if (error || !std::filesystem::exists(status))
        return tl::unexpected(missing(path, "no file", "check the path"));
    if (std::filesystem::is_directory(status))
        return tl::unexpected(missing(path, "a folder", "name the file inside it"));
    if (!std::filesystem::is_regular_file(status))
        return tl::unexpected(missing(path, "no ordinary file", "name an ordinary file"));
    const std::uintmax_t size = std::filesystem::file_size(path, error);
    if (error) return tl::unexpected(missing(path, error.message(), "check the permissions"));
    if (size > max_bytes)
        return tl::unexpected(Fault{FaultCode::file_broken,
                                    path,
                                    0,
                                    {},
                                    fmt::format("{} bytes", size),
                                    fmt::format("at most {} bytes", max_bytes),
                                    "split the file"});
    return size;
}

Expected<std::string> read_local_file(const std::string& path, std::uintmax_t max_bytes) {
    const auto size = local_file_size(path, max_bytes);
    if (!size) return tl::unexpected(size.error());
    std::ifstream stream(path, std::ios::binary);
    std::string content(static_cast<std::size_t>(*size), '\0');
    if (!stream || !stream.read(content.data(), static_cast<std::streamsize>(content.size())))
        return tl::unexpected(missing(path, "a file that cannot be read", "check the permissions"));
    return content;
}

Expected<std::string> content_fingerprint(const std::string& path) {
    const auto size = local_file_size(path, UINTMAX_MAX);
    if (!size) return tl::unexpected(size.error());
    std::ifstream stream(path, std::ios::binary);
    if (!stream) return tl::unexpected(missing(path, "a file that cannot be read", "check the permissions"));
    const std::unique_ptr<XXH3_state_t, decltype(&XXH3_freeState)> state(XXH3_createState(), XXH3_freeState);
    XXH3_128bits_reset(state.get());
    std::vector<char> block(1U << 20U);
    while (stream) {
        stream.read(block.data(), static_cast<std::streamsize>(block.size()));
        XXH3_128bits_update(state.get(), block.data(), static_cast<std::size_t>(stream.gcount()));
    }
    if (stream.bad())
        return tl::unexpected(missing(path, "a file that cannot be read to its end", "check the disk"));
    const XXH128_hash_t hash = XXH3_128bits_digest(state.get());
    return fmt::format("{:016x}{:016x}", hash.high64, hash.low64);
}

} // namespace unstring
