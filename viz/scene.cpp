#include "scene.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <fmt/format.h>
#include <vtkCellData.h>
#include <vtkDoubleArray.h>
#include <vtkNew.h>
#include <vtkPointData.h>
#include <vtkPoints.h>
#include <vtkXMLPolyDataReader.h>
#include <vtkXMLUnstructuredGridReader.h>

namespace carlin::viz
{
namespace
{
constexpr const char* displacement_name = "displacement [m]";
constexpr const char* colour_name = "von Mises stress, largest of both faces and middle [MPa]";

template <typename Reader> auto read(const std::filesystem::path& file)
{
  vtkNew<Reader> reader;
  if (!std::filesystem::is_regular_file(file) || reader->CanReadFile(file.c_str()) == 0)
    throw ViewError(file.string() + ": cannot be read");
  reader->SetFileName(file.c_str());
  reader->Update();
  return vtkSmartPointer<std::remove_pointer_t<decltype(reader->GetOutput())>>(reader->GetOutput());
}

vtkDataArray& array(vtkFieldData& data, const char* name, const std::filesystem::path& file)
{
  vtkDataArray* found = data.GetArray(name);
  if (found == nullptr)
    throw ViewError(file.string() + ": has no array '" + name + "'");
  return *found;
}

double largest_length(vtkDataArray& vectors)
{
  double largest = 0.0;
  for (vtkIdType i = 0; i < vectors.GetNumberOfTuples(); ++i)
  {
    std::array<double, 3> v{};
    vectors.GetTuple(i, v.data());
    largest = std::max(largest, std::hypot(v[0], v[1], v[2]));
  }
  return largest;
}

void warp(vtkPointSet& set, double scale)
{
  vtkDataArray* vectors = set.GetPointData()->GetArray(displacement_name);
  if (vectors == nullptr)
    return;
  vtkNew<vtkPoints> moved;
  moved->SetDataTypeToDouble();
  for (vtkIdType i = 0; i < set.GetNumberOfPoints(); ++i)
  {
    std::array<double, 3> point{}, vector{};
    set.GetPoint(i, point.data());
    vectors->GetTuple(i, vector.data());
    for (std::size_t axis = 0; axis < 3; ++axis)
      point[axis] += scale * vector[axis];
    moved->InsertNextPoint(point.data());
  }
  set.SetPoints(moved);
}

/// Adds the array the hull is coloured by; of members, which have no plate stress, the size of
/// their own stress.
std::vector<double> add_colours(vtkUnstructuredGrid& grid, const std::filesystem::path& file)
{
  vtkFieldData& cells = *grid.GetCellData();
  const std::array<vtkDataArray*, 4> stresses{
      &array(cells, "von Mises stress, middle [Pa]", file),
      &array(cells, "von Mises stress, inner face [Pa]", file),
      &array(cells, "von Mises stress, outer face [Pa]", file),
      &array(cells, "member stress, axial and bending [Pa]", file)};
  vtkNew<vtkDoubleArray> colours;
  colours->SetName(colour_name);
  std::vector<double> values;
  for (vtkIdType cell = 0; cell < grid.GetNumberOfCells(); ++cell)
  {
    double value = 0.0;
    for (vtkDataArray* stress : stresses)
      if (const double found = std::abs(stress->GetComponent(cell, 0)); std::isfinite(found))
        value = std::max(value, 1e-6 * found);
    colours->InsertNextValue(value);
    values.push_back(value);
  }
  grid.GetCellData()->AddArray(colours);
  grid.GetCellData()->SetActiveScalars(colour_name);
  return values;
}
} // namespace

double colour_top(std::vector<double> values)
{
  if (values.empty())
    return 0.0;
  constexpr double share = 0.98;
  const auto place =
      static_cast<std::ptrdiff_t>(std::ceil(share * static_cast<double>(values.size())) - 1.0);
  std::ranges::nth_element(values, values.begin() + place);
  return values[static_cast<std::size_t>(place)];
}

double round_scale(double value)
{
  assert(value > 0.0);
  const double power = std::pow(10.0, std::floor(std::log10(value)));
  for (const double step : {5.0, 2.0})
    if (step * power <= value)
      return step * power;
  return power;
}

std::array<double, 3> colour_at(double value)
{
  constexpr std::array<std::array<double, 3>, 5> stops{{{0.03, 0.10, 0.32},
                                                        {0.25, 0.30, 0.43},
                                                        {0.48, 0.48, 0.47},
                                                        {0.74, 0.67, 0.42},
                                                        {1.00, 0.92, 0.36}}};
  const double place = std::clamp(value, 0.0, 1.0) * (stops.size() - 1);
  const std::size_t below = std::min(static_cast<std::size_t>(place), stops.size() - 2);
  const double share = place - static_cast<double>(below);
  std::array<double, 3> colour{};
  for (std::size_t c = 0; c < 3; ++c)
    colour[c] = (1.0 - share) * stops[below][c] + share * stops[below + 1][c];
  return colour;
}

Scene make_scene(const std::filesystem::path& results, const SceneOptions& options)
{
  const std::vector<ResultFile> contents = read_contents(results);
  const std::vector<std::string> names = configurations(contents);
  if (names.empty())
    throw ViewError(results.string() + ": holds no configuration");
  Scene scene;
  scene.coloured_by = colour_name;
  double length = 0.0, largest = 0.0;
  std::vector<double> stresses;
  for (const std::string& name : {options.before.empty() ? names.front() : options.before,
                                  options.after.empty() ? names.back() : options.after})
  {
    const auto find = [&](const char* what)
    { return stage_file(contents, name, options.load_case, options.stage, what); };
    const std::filesystem::path file = find("structure"), tanks = find("tanks");
    if (file.empty())
      throw ViewError("configuration '" + name + "' has no hull in this stage to show");
    Hull hull;
    hull.title = name;
    hull.grid = read<vtkXMLUnstructuredGridReader>(file);
    if (!tanks.empty())
      hull.tanks = read<vtkXMLPolyDataReader>(tanks);
    hull.largest_displacement =
        largest_length(array(*hull.grid->GetPointData(), displacement_name, file));
    const std::vector<double> values = add_colours(*hull.grid, file);
    stresses.insert(stresses.end(), values.begin(), values.end());
    length = std::max(length, hull.grid->GetLength());
    largest = std::max(largest, hull.largest_displacement);
    scene.hulls.push_back(hull);
  }
  scene.colour_range[1] = colour_top(stresses);
  scene.largest_stress = stresses.empty() ? 0.0 : std::ranges::max(stresses);
  constexpr double share_of_length = 0.04;
  if (options.warp_scale)
    scene.warp_scale = *options.warp_scale;
  else if (largest > 0.0 && length > 0.0)
    scene.warp_scale = round_scale(share_of_length * length / largest);
  for (const Hull& hull : scene.hulls)
  {
    warp(*hull.grid, scene.warp_scale);
    if (hull.tanks)
      warp(*hull.tanks, scene.warp_scale);
  }
  scene.caption =
      fmt::format("{}, {}; displacement drawn {:g} times; largest stress {:.0f} MPa, last colour "
                  "from {:.0f} MPa on",
                  options.load_case, options.stage, scene.warp_scale, scene.largest_stress,
                  scene.colour_range[1]);
  return scene;
}
} // namespace carlin::viz
