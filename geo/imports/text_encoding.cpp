#include "geo/imports/text_encoding.h"

#include <algorithm>
#include <cerrno>
#include <cstddef>
#include <cstdint>
#include <optional>

#include <fmt/format.h>
#include <iconv.h>

namespace unstring {
namespace {

constexpr std::string_view kUtf8Mark = "\xEF\xBB\xBF";
constexpr std::string_view kUtf16LittleMark = "\xFF\xFE";
constexpr std::string_view kUtf16BigMark = "\xFE\xFF";

class Converter {
public:
    explicit Converter(const std::string& encoding) : handle_(iconv_open("UTF-8", encoding.c_str())) {}
    ~Converter() {
        if (is_open()) iconv_close(handle_);
    }
    Converter(const Converter&) = delete;
    Converter& operator=(const Converter&) = delete;
    [[nodiscard]] bool is_open() const { return handle_ != reinterpret_cast<iconv_t>(-1); }

    /// Nothing where a byte has no meaning in the encoding.
    [[nodiscard]] std::optional<std::string> to_utf8(std::string_view bytes) const {
        std::string out(bytes.size() * 4 + 16, '\0');
        char* from = const_cast<char*>(bytes.data()); // iconv's signature; it does not write there
        std::size_t from_left = bytes.size();
        char* to = out.data();
        std::size_t to_left = out.size();
        if (iconv(handle_, &from, &from_left, &to, &to_left) == static_cast<std::size_t>(-1))
            return std::nullopt;
        out.resize(out.size() - to_left);
        return out;
    }

private:
    iconv_t handle_;
};

bool is_continuation(unsigned char byte) { return (byte & 0xC0U) == 0x80U; }

/// Length of the UTF-8 sequence at `at`, 0 where there is none (overlong forms and surrogates are none).
std::size_t sequence_length(std::string_view bytes, std::size_t at) {
    const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(bytes[at + i]); };
    const unsigned char first = byte(0);
    if (first < 0x80U) return 1;
    const std::size_t length = first >= 0xF0U ? 4 : first >= 0xE0U ? 3 : 2;
    if (first < 0xC2U || first > 0xF4U || at + length > bytes.size()) return 0;
    for (std::size_t i = 1; i < length; ++i)
        if (!is_continuation(byte(i))) return 0;
    if (first == 0xE0U && byte(1) < 0xA0U) return 0;
    if (first == 0xEDU && byte(1) > 0x9FU) return 0;
    if (first == 0xF0U && byte(1) < 0x90U) return 0;
    if (first == 0xF4U && byte(1) > 0x8FU) return 0;
    return length;
}

/// Some 40 characters around the first letter beyond ASCII, on one line.
std::string sample_of(std::string_view utf8) {
    const auto odd =
        std::find_if(utf8.begin(), utf8.end(), [](char c) { return static_cast<unsigned char>(c) >= 0x80U; });
    const auto at = static_cast<std::size_t>(odd - utf8.begin());
    std::size_t begin = at > 20 ? at - 20 : 0;
    std::size_t end = std::min(utf8.size(), at + 20);
    while (begin < at && is_continuation(static_cast<unsigned char>(utf8[begin]))) ++begin;
    while (end < utf8.size() && is_continuation(static_cast<unsigned char>(utf8[end]))) ++end;
    std::string sample(utf8.substr(begin, end - begin));
    std::replace_if(
        sample.begin(), sample.end(), [](char c) { return c == '\n' || c == '\r' || c == '\t'; }, ' ');
    return sample;
}

Expected<DecodedText> decode_as(std::string_view bytes, const std::string& encoding,
                                const std::string& file) {
    if (auto known = check_encoding(encoding); !known) return tl::unexpected(known.error());
    const Converter converter(encoding);
    auto text = converter.to_utf8(bytes);
    if (!text)
        return tl::unexpected(Fault{FaultCode::file_broken,
                                    file,
                                    0,
                                    {},
                                    fmt::format("bytes that are not {}", encoding),
                                    fmt::format("a text in {}", encoding),
                                    "give the right --encoding"});
    return DecodedText{std::move(*text), encoding, false, {}, 0};
}

DecodedText guess(std::string_view bytes) {
    // Latin-1 takes every byte, so the guess always comes to an end.
    for (const std::string encoding : {"WINDOWS-1252", "ISO-8859-1"})
        if (auto text = Converter(encoding).to_utf8(bytes)) {
            const auto odd = std::find_if(bytes.begin(), bytes.end(),
                                          [](char c) { return static_cast<unsigned char>(c) >= 0x80U; });
            std::string sample = sample_of(*text);
            return {std::move(*text), encoding, true, std::move(sample),
                    1 + std::count(bytes.begin(), odd, '\n')};
        }
    return {};
}

} // namespace

Expected<void> check_encoding(const std::string& encoding) {
    if (Converter(encoding).is_open()) return {};
    return tl::unexpected(Fault{FaultCode::bad_usage,
                                {},
                                0,
                                "--encoding",
                                encoding,
                                "a character set that is known",
                                "give a name such as Windows-1252, ISO-8859-15 or UTF-16LE"});
}

bool is_utf8(std::string_view bytes) {
    for (std::size_t at = 0; at < bytes.size();) {
        const std::size_t length = sequence_length(bytes, at);
        if (length == 0) return false;
        at += length;
    }
    return true;
}

Expected<DecodedText> decode_text(std::string bytes, const std::string& encoding, const std::string& file) {
    const std::string_view view = bytes;
    if (view.starts_with(kUtf16LittleMark)) return decode_as(view.substr(2), "UTF-16LE", file);
    if (view.starts_with(kUtf16BigMark)) return decode_as(view.substr(2), "UTF-16BE", file);
    const bool is_wide = encoding.find("16") != std::string::npos || encoding.find("32") != std::string::npos;
    if (!is_wide && bytes.find('\0') != std::string::npos)
        return tl::unexpected(
            Fault{FaultCode::file_broken,
                  file,
                  0,
                  {},
                  "NUL bytes",
                  "a text file",
                  "export the table as CSV; a UTF-16 file without mark needs --encoding UTF-16LE"});
    if (view.starts_with(kUtf8Mark)) bytes.erase(0, kUtf8Mark.size());
    if (!is_wide && is_utf8(bytes)) return DecodedText{std::move(bytes), "UTF-8", false, {}, 0};
    if (!encoding.empty()) return decode_as(bytes, encoding, file);
    return guess(bytes);
}

} // namespace unstring
