#pragma once
// The catalogue's rows in the project file, one JSON object each, in catalogue.json's own keys.

#include "geo/project/database.h"
#include "model/catalog/catalog.h"

namespace unstring {

void write_catalog(Database& database, const Catalog& catalog);
[[nodiscard]] Catalog read_catalog(Database& database);
/// The same rows as one text, for the input hash.
[[nodiscard]] std::string catalog_text(const Catalog& catalog);

} // namespace unstring
