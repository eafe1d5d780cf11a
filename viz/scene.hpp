#pragma once

#include "contents.hpp"

#include <array>
#include <optional>
#include <string>
#include <vector>
#include <vtkPolyData.h>
#include <vtkSmartPointer.h>
#include <vtkUnstructuredGrid.h>

namespace carlin::viz
{
/// One hull of a picture, its points moved by the warp scale times their displacement.
struct Hull
{
  std::string title;                         ///< "as built"
  vtkSmartPointer<vtkUnstructuredGrid> grid; ///< cell array Scene::coloured_by [MPa]
  vtkSmartPointer<vtkPolyData> tanks;        ///< empty: none aboard
  double largest_displacement = 0.0;         ///< [m]
};

/// What a picture shows. No OpenGL here, so unit tests need no display.
struct Scene
{
  std::vector<Hull> hulls;              ///< before, after
  std::string caption;                  ///< case, stage and warp scale
  std::string coloured_by;              ///< cell array, name with unit
  std::array<double, 2> colour_range{}; ///< [MPa]; the same for all hulls; the few cells above it
                                        ///< have its last colour
  double largest_stress = 0.0;          ///< [MPa]
  double warp_scale = 1.0;              ///< displacements are drawn this many times their size
};

struct SceneOptions
{
  std::string before, after; ///< configurations; empty: the first and the last of the run
  std::string load_case, stage;
  std::optional<double> warp_scale; ///< absent: the largest displacement becomes about a
                                    ///< twenty-fifth of the length, a round number
};

/// @throws ViewError for names that are not there, or files that cannot be read.
Scene make_scene(const std::filesystem::path& results, const SceneOptions& options);

/// Largest of 1, 2, 5 times a power of ten that is not above `value`. @pre value > 0 (asserted).
double round_scale(double value);

/// Value that 98 of 100 do not exceed: where colours end, so that a few hot cells do not make the
/// rest look alike. Zero for no values.
double colour_top(std::vector<double> values);

/// Colour of a value from 0 to 1: dark blue over grey to yellow, lightness rising throughout, so
/// that it also reads without red and green, and printed grey. Components 0 to 1.
std::array<double, 3> colour_at(double value);
} // namespace carlin::viz
