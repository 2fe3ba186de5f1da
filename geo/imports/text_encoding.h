#pragma once
// Bytes of a text file to UTF-8.

#include <string>
#include <string_view>

#include "model/fault.h"

namespace unstring {

struct DecodedText {
    std::string utf8;
    std::string encoding; ///< "UTF-8", "UTF-16LE", the one given, or the one guessed
    bool is_guessed = false;
    std::string sample;   ///< of a guessed text: the first words with a letter beyond ASCII
    long sample_line = 0; ///< the line that they stand in, 1 = the first
};

/// By the byte order mark; else UTF-8 where the bytes are; else `encoding`; else guessed as Windows-1252.
/// @param encoding  a name that iconv knows, or empty
/// @fault bad_usage (name unknown), file_broken (NUL bytes: no text; bytes that are not in the encoding)
[[nodiscard]] Expected<DecodedText> decode_text(std::string bytes, const std::string& encoding,
                                                const std::string& file);

/// @fault bad_usage where iconv does not know the name
[[nodiscard]] Expected<void> check_encoding(const std::string& encoding);

[[nodiscard]] bool is_utf8(std::string_view bytes);

} // namespace unstring
