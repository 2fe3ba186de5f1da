#pragma once
// Fields of a work-out input file, read with their checks: what is missing, of the wrong type or out of range
// is a fault that names file and field; a key that no topic knows is one too, so that a misspelt option
// cannot pass.

#include <initializer_list>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include <nlohmann/json.hpp>

#include "model/fault.h"

namespace unstring {

class JsonFields {
public:
    JsonFields(const nlohmann::json& object, std::string file, std::string path = {});

    /// Each answers the value, or remembers the first fault and answers a harmless value.
    double number(std::string_view key, double low, double high);
    double number_or(std::string_view key, double fallback, double low, double high);
    std::optional<double> optional_number(std::string_view key, double low,
                                          double high); ///< null counts as absent
    long integer(std::string_view key, long low, long high);
    std::string text_or(std::string_view key, std::string fallback);
    std::vector<double> numbers(std::string_view key, double low, double high);
    bool has(std::string_view key) const;
    const nlohmann::json& raw(std::string_view key);
    void only(std::initializer_list<std::string_view> known);
    void refuse(std::string_view key, std::string found, std::string wanted, std::string remedy);

    [[nodiscard]] const std::optional<Fault>& fault() const { return fault_; }

private:
    const nlohmann::json& object_;
    std::string file_, path_;
    std::optional<Fault> fault_;
};

} // namespace unstring
