#pragma once

#include "grid.hpp"

#include <vector>

namespace carlin
{
/// Number of cells in a length so that none is longer than the mesh size.
Index divisions(double length, double mesh_size);

/// All station planes from aft, with the named ones marked.
struct StationPlanes
{
  std::vector<Section> sections;
  std::vector<GridPlane> named;
};
/// Divides each interval by its longest hull line; between named stations position and tan(rake)
/// change linearly, so that station planes fan evenly at every height.
/// @throws ModelError
StationPlanes station_planes(const Hull& hull, const HullForm& form, double mesh_size);

/// Where a named buttock meets bottom and deck at one station; (y, z) [m].
struct Column
{
  Vector2 bottom = Vector2::Zero(), deck = Vector2::Zero();
};
/// Columns of the named buttocks, centreline and chine included.
struct ColumnPlanes
{
  std::vector<std::string> names;
  std::vector<std::vector<Column>> columns; ///< [station][buttock]
};
/// @throws ModelError
ColumnPlanes column_planes(const Hull& hull, const HullForm& form, const StationPlanes& stations,
                           double mesh_size);

/// Heights of the named levels on the named columns, bottom and deck included.
struct HeightPlanes
{
  std::vector<std::string> names;
  std::vector<std::vector<std::vector<double>>> z; ///< [station][buttock][height] [m]
};
/// @throws ModelError
HeightPlanes height_planes(const Hull& hull, const HullForm& form, const StationPlanes& stations,
                           const ColumnPlanes& columns, double mesh_size);

/// "station 'frame-5'" or "a station between 'frame-5' and 'frame-6'".
std::string station_words(const StationPlanes& stations, std::size_t station);

/// Range of station planes between two names; empty names are the ends.
/// @throws ModelError for a name that is not a station, or from forward to aft.
std::pair<std::size_t, std::size_t> station_range(const StationPlanes& stations, const Named& plane,
                                                  const std::string& from, const std::string& to);
} // namespace carlin
