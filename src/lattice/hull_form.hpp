#pragma once

#include "fair_curve.hpp"

#include "carlin/core/types.hpp"
#include "carlin/description/hull.hpp"

#include <string>
#include <vector>

namespace carlin
{
/// Port half of the hull cut by the plane x = position + slope z. Coordinates are (y, z); x follows
/// from the plane.
struct Section
{
  double position = 0.0, slope = 0.0;
  std::vector<Vector2> points; ///< where the hull lines cross the plane, keel to deck edge [m]
  std::size_t chine = 0;       ///< index into points
  double deck_curvature = 0.0; ///< deck z = edge z + deck_curvature (y_edge^2 - y^2) [1/m]

  double x_at(double z) const { return position + slope * z; }
  const Vector2& chine_point() const { return points[chine]; }
  const Vector2& deck_edge() const { return points.back(); }
  double bottom_z(double y) const; ///< the outermost straight goes on beyond the chine
  double side_y(double z) const;   ///< @pre z from the chine to the deck edge
  double deck_z(double y) const;
};

/// Hull as lines along x, one through the points of the same name at all stations of the offsets.
/// Each line is a curve over its own x, so that the points of a station need not share one x.
class HullForm
{
public:
  /// @throws ModelError for offsets that cannot be lofted.
  explicit HullForm(const Hull& hull);

  /// @throws ValueError if the plane misses a line by more than 0.2 % of the hull's length (up to
  ///   there the line goes on straight), or if the section is not four-sided: the bottom must go
  ///   outward all the way to the chine, the side upward all the way to the deck edge.
  Section section(double position, double slope) const;

  const FileLocation& where() const { return where_; }
  const std::vector<std::string>& names() const { return names_; }
  std::size_t chine() const { return chine_; }

private:
  double crossing(std::size_t line, double position, double slope) const;
  void add_line(const HullOffsets& offsets, std::size_t line);

  FileLocation where_;
  std::vector<std::string> names_;
  std::vector<std::vector<double>> x_; ///< of the given points, by line
  std::vector<FairCurve> y_, z_;
  std::size_t chine_ = 0;
  double length_ = 0.0, deck_curvature_ = 0.0;
};
} // namespace carlin
