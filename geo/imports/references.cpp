#include "geo/imports/references.h"

#include <algorithm>

#include <fmt/format.h>

namespace unstring {
namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }

std::string alike_form(std::string_view name) {
    std::string out;
    for (std::size_t i = 0; i < name.size(); ++i) {
        char c = name[i];
        if (c >= 'a' && c <= 'z') c = static_cast<char>(c - 32);
        const bool is_kept = is_digit(c) || (c >= 'A' && c <= 'Z') || static_cast<unsigned char>(c) >= 0x80U;
        const bool begins_number = out.empty() || !is_digit(out.back());
        const bool is_leading_zero =
            c == '0' && begins_number && i + 1 < name.size() && is_digit(name[i + 1]);
        if (is_kept && !is_leading_zero) out += c;
    }
    return out;
}

/// The only number in a name; empty where there are none or several.
std::string only_number(std::string_view name) {
    std::string number;
    for (std::size_t i = 0; i < name.size(); ++i) {
        if (!is_digit(name[i])) continue;
        if (!number.empty() && !is_digit(name[i - 1])) return {};
        number += name[i];
    }
    const auto first = std::min(number.find_first_not_of('0'), number.empty() ? 0 : number.size() - 1);
    return number.substr(first);
}

void add_once(std::unordered_map<std::string, StringIx>& names, std::string name, StringIx string) {
    if (name.empty()) return;
    const auto [at, is_new] = names.emplace(std::move(name), string);
    if (!is_new && at->second != string) at->second = StringIx(); // two that fit: neither
}

class Resolver {
public:
    explicit Resolver(Gathered& out) : out_(out), names_(out.city) {
        for (std::size_t i = 0; i < out.city.poles.size(); ++i) poles_.emplace(out.city.poles[i].id, i);
    }

    void poles() {
        for (Pole& pole : out_.city.poles)
            pole.string = string_of(pole.string_given, pole.id, pole.from, "poles");
    }

    void transformers() {
        for (Transformer& unit : out_.city.transformers) {
            unit.strings.clear();
            for (const std::string& given : unit.strings_given)
                if (const StringIx string = string_of(given, unit.id, unit.from, "transformers");
                    string.is_valid())
                    unit.strings.push_back(string);
        }
    }

    void cutbacks() {
        for (CutBack& cutback : out_.city.cutbacks) {
            cutback.string = string_of(cutback.string_given, cutback.string_given, cutback.from, "cutbacks");
            for (const std::string& end : {cutback.pole_a, cutback.pole_b})
                if (end != "out" && end != "return" && !has_pole(end))
                    say_pole_unknown(end, cutback.from, cutback.string_given, "cutbacks");
        }
    }

    void services() {
        for (ServicePoint& service : out_.city.services) {
            if (service.pole_given.empty()) continue;
            const auto at = poles_.find(service.pole_given);
            if (at == poles_.end()) {
                say_pole_unknown(service.pole_given, service.from, service.id, "services");
                continue;
            }
            const Pole& pole = out_.city.poles[at->second];
            if (service.has_place || !pole.has_place) continue;
            service.place = pole.place;
            service.has_place = true;
        }
    }

    void marks() {
        const auto is_lost = [&](const MarkRow& mark) {
            if (has_pole(mark.pole_id)) return false;
            say_pole_unknown(mark.pole_id, mark.from, mark.pole_id, "marks");
            RowCount& count = out_.rows["marks"];
            --count.kept;
            ++count.set_aside;
            return true;
        };
        std::erase_if(out_.marks, is_lost);
    }

private:
    [[nodiscard]] bool has_pole(const std::string& id) const { return poles_.contains(id); }

    StringIx string_of(const std::string& given, const std::string& record, const RowRef& from,
                       const char* table) {
        if (given.empty()) return {};
        const StringIx string = names_.find(given);
        if (!string.is_valid()) return string;
        const std::string& id = out_.city.strings[string.place()].id;
        if (id != given)
            out_.findings.push_back(make_finding(
                "string-name-variant", from.file, from.row, record, fmt::format("string \"{}\"", given),
                fmt::format("\"{}\"", id), fmt::format("taken as {}; write it alike", id), table));
        return string;
    }

    void say_pole_unknown(const std::string& pole, const RowRef& from, const std::string& record,
                          const char* table) {
        out_.findings.push_back(make_finding("pole-unknown", from.file, from.row, record,
                                             pole.empty() ? "no pole" : fmt::format("pole \"{}\"", pole),
                                             "a pole of the poles file", "mend the id", table));
    }

    Gathered& out_;
    StringNames names_;
    std::unordered_map<std::string, std::size_t> poles_;
};

} // namespace

StringNames::StringNames(const City& city) {
    for (std::size_t i = 0; i < city.strings.size(); ++i) {
        const std::string& id = city.strings[i].id;
        exact_.emplace(id, StringIx(i));
        add_once(alike_, alike_form(id), StringIx(i));
        add_once(by_number_, only_number(id), StringIx(i));
    }
}

StringIx StringNames::find(std::string_view given) const {
    const auto look = [](const auto& names, const std::string& name) {
        const auto at = names.find(name);
        return at == names.end() ? StringIx() : at->second;
    };
    if (const StringIx string = look(exact_, std::string(given)); string.is_valid()) return string;
    const std::string alike = alike_form(given);
    if (const StringIx string = look(alike_, alike); string.is_valid()) return string;
    const bool is_number = !alike.empty() && std::all_of(alike.begin(), alike.end(), is_digit);
    return is_number ? look(by_number_, only_number(alike)) : StringIx();
}

void resolve_references(Gathered& out) {
    std::erase_if(out.findings, [](const Finding& finding) {
        return finding.code == "string-name-variant" ||
               (finding.code == "pole-unknown" && finding.table != "asbuilt");
    });
    Resolver resolver(out);
    resolver.poles();
    resolver.transformers();
    resolver.cutbacks();
    resolver.services();
    resolver.marks();
}

} // namespace unstring
