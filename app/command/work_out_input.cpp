#include "app/command/work_out_input.h"

#include <algorithm>
#include <cmath>
#include <fstream>
#include <sstream>
#include <utility>

#include <fmt/format.h>

#include "app/command/work_out.h"

namespace unstring {
namespace {

std::string shown(const nlohmann::json& value) {
    std::string text = value.dump();
    if (text.size() > 60) text = text.substr(0, 57) + "...";
    return text;
}

} // namespace

Expected<nlohmann::json> read_json_file(const std::string& path) {
    std::ifstream stream(path, std::ios::binary);
    if (!stream)
        return tl::unexpected(
            Fault{FaultCode::file_missing, path, 0, {}, "no readable file", "a JSON file", "check the path"});
    std::stringstream content;
    content << stream.rdbuf();
    std::string text = content.str();
    if (text.starts_with("\xEF\xBB\xBF")) text.erase(0, 3);
    try {
        return nlohmann::json::parse(text);
    } catch (const nlohmann::json::parse_error& error) {
        const auto end = text.begin() + static_cast<long>(std::min(error.byte, text.size()));
        const long row = 1 + std::count(text.begin(), end, '\n');
        return tl::unexpected(Fault{FaultCode::file_broken,
                                    path,
                                    row,
                                    {},
                                    fmt::format("no JSON at byte {}", error.byte),
                                    "valid JSON",
                                    "mend the file there"});
    }
}

JsonFields::JsonFields(const nlohmann::json& object, std::string file, std::string path)
    : object_(object), file_(std::move(file)), path_(std::move(path)) {
    if (!object_.is_object()) refuse("", shown(object_), "a JSON object", "put the keys in { }");
}

void JsonFields::refuse(std::string_view key, std::string found, std::string wanted, std::string remedy) {
    if (fault_) return;
    std::string field = path_;
    if (!key.empty()) field += (field.empty() ? "" : ".") + std::string(key);
    fault_ = Fault{FaultCode::value_unreadable,
                   file_,
                   0,
                   std::move(field),
                   std::move(found),
                   std::move(wanted),
                   std::move(remedy)};
}

bool JsonFields::has(std::string_view key) const {
    if (!object_.is_object()) return false;
    const auto at = object_.find(std::string(key));
    return at != object_.end() && !at->is_null();
}

const nlohmann::json& JsonFields::raw(std::string_view key) {
    static const nlohmann::json kNull;
    if (!has(key)) return kNull;
    return object_.at(std::string(key));
}

double JsonFields::number(std::string_view key, double low, double high) {
    if (!has(key)) {
        refuse(key, "nothing", fmt::format("a number from {} to {}", low, high), "add it");
        return std::max(low, std::min(high, 0.0));
    }
    const nlohmann::json& value = raw(key);
    if (!value.is_number() || !std::isfinite(value.get<double>())) {
        refuse(key, shown(value), "a number", "write it without quotes or unit");
        return std::max(low, std::min(high, 0.0));
    }
    const double read = value.get<double>();
    if (read < low || read > high) {
        refuse(key, shown(value), fmt::format("{} to {}", low, high), "check the value and its unit");
        return std::max(low, std::min(high, read));
    }
    return read;
}

double JsonFields::number_or(std::string_view key, double fallback, double low, double high) {
    return has(key) ? number(key, low, high) : fallback;
}

std::optional<double> JsonFields::optional_number(std::string_view key, double low, double high) {
    if (!has(key)) return std::nullopt;
    return number(key, low, high);
}

long JsonFields::integer(std::string_view key, long low, long high) {
    const double value = number(key, static_cast<double>(low), static_cast<double>(high));
    if (std::floor(value) != value) refuse(key, fmt::format("{}", value), "a whole number", "round it");
    return static_cast<long>(value);
}

std::string JsonFields::text_or(std::string_view key, std::string fallback) {
    if (!has(key)) return fallback;
    const nlohmann::json& value = raw(key);
    if (value.is_string()) return value.get<std::string>();
    refuse(key, shown(value), "text", "put it in quotes");
    return fallback;
}

std::vector<double> JsonFields::numbers(std::string_view key, double low, double high) {
    std::vector<double> out;
    const nlohmann::json& list = raw(key);
    if (!list.is_array()) {
        refuse(key, has(key) ? shown(list) : "nothing", "a list of numbers", "write [..]");
        return out;
    }
    for (std::size_t i = 0; i < list.size(); ++i) {
        const bool fits =
            list[i].is_number() && list[i].get<double>() >= low && list[i].get<double>() <= high;
        if (!fits) {
            refuse(fmt::format("{}[{}]", key, i), shown(list[i]),
                   fmt::format("a number from {} to {}", low, high), "check the value and its unit");
            return out;
        }
        out.push_back(list[i].get<double>());
    }
    return out;
}

void JsonFields::only(std::initializer_list<std::string_view> known) {
    if (!object_.is_object()) return;
    for (const auto& [key, value] : object_.items()) {
        if (std::find(known.begin(), known.end(), key) != known.end()) continue;
        std::string list;
        for (const std::string_view name : known) list += (list.empty() ? "" : ", ") + std::string(name);
        refuse(key, "a key that is not known here", "one of " + list, "check its spelling");
    }
}

} // namespace unstring
