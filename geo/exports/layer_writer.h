#pragma once
// One layer of a vector file, written feature by feature.

#include <initializer_list>
#include <string>
#include <utility>
#include <vector>

#include <ogrsf_frmts.h>

#include "model/quantities.h"

namespace unstring {

class LayerWriter {
public:
    /// wkbNone makes a table without geometry. A layer that cannot be made shows in is_good().
    LayerWriter(GDALDataset& file, const char* name, OGRwkbGeometryType kind, OGRSpatialReference* crs,
                std::initializer_list<std::pair<const char*, OGRFieldType>> fields);

    [[nodiscard]] bool is_good() const { return layer_ != nullptr; }
    void begin();
    void set(const char* field, const std::string& value);
    void set(const char* field, int value);
    void set(const char* field, double value); ///< no number is left blank
    void point(MapPoint place);
    void line(const std::vector<MapPoint>& places); ///< fewer than two places: no geometry
    [[nodiscard]] bool end();

private:
    OGRLayer* layer_ = nullptr;
    OGRFeatureUniquePtr feature_;
};

} // namespace unstring
