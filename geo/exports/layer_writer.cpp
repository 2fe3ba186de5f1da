#include "geo/exports/layer_writer.h"

#include <cmath>

namespace unstring {

LayerWriter::LayerWriter(GDALDataset& file, const char* name, OGRwkbGeometryType kind,
                         OGRSpatialReference* crs,
                         std::initializer_list<std::pair<const char*, OGRFieldType>> fields)
    : layer_(file.CreateLayer(name, crs, kind, nullptr)) {
    for (const auto& [field, type] : fields) {
        if (layer_ == nullptr) return;
        OGRFieldDefn definition(field, type);
        if (layer_->CreateField(&definition) != OGRERR_NONE) layer_ = nullptr;
    }
}

void LayerWriter::begin() {
    if (layer_ != nullptr) feature_.reset(OGRFeature::CreateFeature(layer_->GetLayerDefn()));
}

void LayerWriter::set(const char* field, const std::string& value) {
    if (feature_ != nullptr && !value.empty()) feature_->SetField(field, value.c_str());
}

void LayerWriter::set(const char* field, int value) {
    if (feature_ != nullptr) feature_->SetField(field, value);
}

void LayerWriter::set(const char* field, double value) {
    if (feature_ != nullptr && std::isfinite(value)) feature_->SetField(field, value);
}

void LayerWriter::point(MapPoint place) {
    if (feature_ == nullptr) return;
    const OGRPoint at(place.x_m, place.y_m);
    feature_->SetGeometry(&at);
}

void LayerWriter::line(const std::vector<MapPoint>& places) {
    if (feature_ == nullptr || places.size() < 2) return;
    OGRLineString along;
    for (const MapPoint& place : places) along.addPoint(place.x_m, place.y_m);
    feature_->SetGeometry(&along);
}

bool LayerWriter::end() {
    return feature_ != nullptr && layer_->CreateFeature(feature_.get()) == OGRERR_NONE;
}

} // namespace unstring
