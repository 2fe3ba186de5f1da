#pragma once
// What the records of one table say of another: the string of a pole, the strings of a unit, the pole of a
// service.

#include <string>
#include <string_view>
#include <unordered_map>
#include <vector>

#include "geo/imports/gathered.h"

namespace unstring {

/// Finds the string that a name means: as it is written; else without case, blanks, punctuation and leading
/// zeros
/// ("C-12", "c12", "C 012"); else a bare number that only one string has ("12"). Two that fit: none.
class StringNames {
public:
    explicit StringNames(const City& city);
    [[nodiscard]] StringIx find(std::string_view given) const;

private:
    std::unordered_map<std::string, StringIx> exact_, alike_, by_number_;
};

/// Settles every reference of the city anew, with `string-name-variant` and `pole-unknown` findings; strings
/// that are not there are left for vet. Services without coordinates take their pole's place. Marks of
/// unknown poles are left out and counted as set aside.
void resolve_references(Gathered& out);

} // namespace unstring
