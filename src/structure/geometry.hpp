#pragma once

#include "carlin/element/shell.hpp"

#include <vector>

namespace carlin
{
double distance_to_line(const Vector3& point, const Vector3& from, const Vector3& to);
double distance_to_triangle(const Vector3& point, const Vector3& a, const Vector3& b,
                            const Vector3& c);
/// To the nearer of its four triangles about the middle.
double distance_to_quad(const Vector3& point, const QuadPoints& quad);

/// Whether points lie on one line (or are fewer than three).
bool is_in_line(const std::vector<Vector3>& positions);
} // namespace carlin
