#include "geo/project/geometry_blob.h"

#include <algorithm>
#include <cmath>
#include <cstring>

namespace unstring {
namespace {

constexpr std::uint32_t kPoint = 1, kLine = 2, kPolygon = 3;
constexpr std::size_t kHeader = 8;

template <class T>
void put(std::vector<unsigned char>& blob, T value) {
    const std::size_t at = blob.size();
    blob.resize(at + sizeof(T));
    std::memcpy(blob.data() + at, &value, sizeof(T));
}

template <class T>
std::optional<T> get(std::span<const unsigned char> blob, std::size_t at) {
    if (at + sizeof(T) > blob.size()) return std::nullopt;
    T value;
    std::memcpy(&value, blob.data() + at, sizeof(T));
    return value;
}

MapBox box_of(std::span<const MapPoint> points) {
    MapBox box{points.front(), points.front()};
    for (const MapPoint& point : points) {
        box.low = {std::min(box.low.x_m, point.x_m), std::min(box.low.y_m, point.y_m)};
        box.high = {std::max(box.high.x_m, point.x_m), std::max(box.high.y_m, point.y_m)};
    }
    return box;
}

// "GP", version 0, flags: little endian, envelope of four doubles.
std::vector<unsigned char> header(std::span<const MapPoint> points, int srs_id, std::uint32_t kind) {
    std::vector<unsigned char> blob;
    for (unsigned char byte : {'G', 'P', '\0', '\3'}) put(blob, byte);
    put(blob, static_cast<std::int32_t>(srs_id));
    const MapBox box = box_of(points);
    for (double side : {box.low.x_m, box.high.x_m, box.low.y_m, box.high.y_m}) put(blob, side);
    put(blob, static_cast<unsigned char>(1));
    put(blob, kind);
    return blob;
}

void put_points(std::vector<unsigned char>& blob, std::span<const MapPoint> points) {
    for (const MapPoint& point : points) {
        put(blob, point.x_m);
        put(blob, point.y_m);
    }
}

std::size_t envelope_bytes(unsigned char flags) {
    constexpr std::size_t sizes[] = {0, 32, 48, 48, 64};
    const std::size_t kind = (flags >> 1U) & 7U;
    return kind < 5 ? sizes[kind] : 0;
}

bool is_ours(std::span<const unsigned char> blob) {
    return blob.size() > kHeader && blob[0] == 'G' && blob[1] == 'P' && (blob[3] & 1U) != 0;
}

} // namespace

std::vector<unsigned char> point_blob(MapPoint point, int srs_id) {
    auto blob = header({&point, 1}, srs_id, kPoint);
    put_points(blob, {&point, 1});
    return blob;
}

std::vector<unsigned char> line_blob(std::span<const MapPoint> line, int srs_id) {
    if (line.size() < 2) return {};
    auto blob = header(line, srs_id, kLine);
    put(blob, static_cast<std::uint32_t>(line.size()));
    put_points(blob, line);
    return blob;
}

std::vector<unsigned char> polygon_blob(std::span<const MapPoint> ring, int srs_id) {
    if (ring.size() < 3) return {};
    const bool is_closed = ring.front() == ring.back();
    auto blob = header(ring, srs_id, kPolygon);
    put(blob, std::uint32_t{1});
    put(blob, static_cast<std::uint32_t>(ring.size() + (is_closed ? 0 : 1)));
    put_points(blob, ring);
    if (!is_closed) put_points(blob, ring.first(1));
    return blob;
}

std::optional<std::vector<MapPoint>> points_of_blob(std::span<const unsigned char> blob) {
    if (!is_ours(blob)) return std::nullopt;
    std::size_t at = kHeader + envelope_bytes(blob[3]);
    const auto order = get<unsigned char>(blob, at);
    const auto kind = get<std::uint32_t>(blob, at + 1);
    if (!order || *order != 1 || !kind) return std::nullopt;
    at += 5;
    std::uint32_t count = 1;
    if (*kind == kPolygon) {
        const auto rings = get<std::uint32_t>(blob, at);
        if (!rings || *rings < 1) return std::nullopt;
        at += 4;
    }
    if (*kind == kLine || *kind == kPolygon) {
        const auto stored = get<std::uint32_t>(blob, at);
        if (!stored) return std::nullopt;
        count = *stored;
        at += 4;
    } else if (*kind != kPoint) {
        return std::nullopt;
    }
    if (count > (blob.size() - at) / 16) return std::nullopt;
    std::vector<MapPoint> points(count);
    for (MapPoint& point : points) {
        point = {*get<double>(blob, at), *get<double>(blob, at + 8)};
        at += 16;
    }
    return points;
}

std::optional<MapBox> geometry_envelope(std::span<const unsigned char> blob) {
    if (!is_ours(blob)) return std::nullopt;
    if (envelope_bytes(blob[3]) >= 32) {
        const auto low_x = get<double>(blob, kHeader), high_x = get<double>(blob, kHeader + 8);
        const auto low_y = get<double>(blob, kHeader + 16), high_y = get<double>(blob, kHeader + 24);
        if (!high_y || std::isnan(*low_x)) return std::nullopt;
        return MapBox{{*low_x, *low_y}, {*high_x, *high_y}};
    }
    const auto points = points_of_blob(blob);
    if (!points || points->empty() || std::isnan(points->front().x_m)) return std::nullopt;
    return box_of(*points);
}

} // namespace unstring
