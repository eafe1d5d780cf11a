#include "names.hpp"
#include "tank_shapes.hpp"
#include "vtk_arrays.hpp"
#include "write_vtk.hpp"

#include <functional>
#include <limits>
#include <vtkCellArray.h>
#include <vtkCellData.h>
#include <vtkDoubleArray.h>
#include <vtkIntArray.h>
#include <vtkPointData.h>
#include <vtkPoints.h>
#include <vtkPolyData.h>
#include <vtkXMLPolyDataWriter.h>

namespace carlin
{
namespace
{
constexpr double unlimited = std::numeric_limits<double>::infinity();
constexpr double not_given = std::numeric_limits<double>::quiet_NaN();

struct CollarOf
{
  const Tank* tank;
  const Collar* collar;
};

std::vector<CollarOf> all_collars(const std::vector<Tank>& tanks)
{
  std::vector<CollarOf> all;
  for (const Tank& tank : tanks)
    for (const Collar& collar : tank.collars)
      all.push_back({&tank, &collar});
  return all;
}

std::string axis_name(int axis)
{
  constexpr std::array names{"along", "across", "upright"};
  return std::string("tank axis ") + names[static_cast<std::size_t>(axis)] + " [-]";
}

void add_footprint_nodes(vtkPolyData& data, const ConfigurationSolution& configuration)
{
  struct Entry
  {
    const Footprint* footprint;
    std::size_t number;
    Matrix6 weights;
  };
  std::vector<Entry> entries;
  vtkNew<vtkPoints> points;
  points->SetDataTypeToDouble();
  vtkNew<vtkCellArray> cells;
  for (const Footprint& footprint : configuration.footprints)
  {
    cells->InsertNextCell(static_cast<int>(footprint.nodes.size()));
    const Eigen::SparseMatrix<double, Eigen::RowMajor> by_row = footprint.weights;
    for (std::size_t n = 0; n < footprint.nodes.size(); ++n)
    {
      const Index node = footprint.nodes[n];
      const Vector3& at = configuration.structure->nodes[static_cast<std::size_t>(node)];
      cells->InsertCellPoint(points->InsertNextPoint(at.data()));
      entries.push_back({&footprint, n, Matrix6(by_row.middleRows(6 * node, 6))});
    }
  }
  data.SetPoints(points);
  data.SetVerts(cells);
  vtkFieldData& fields = *data.GetPointData();
  add_array<vtkIntArray>(fields, "node [-]", entries.size(), 1,
                         [&](std::size_t e, int* row) {
                           *row = static_cast<int>(entries[e].footprint->nodes[entries[e].number]);
                         });
  add_array<vtkDoubleArray>(fields, "area [m^2]", entries.size(), 1,
                            [&](std::size_t e, double* row)
                            {
                              const std::vector<double>& areas = entries[e].footprint->areas;
                              *row =
                                  entries[e].number < areas.size() ? areas[entries[e].number] : 0.0;
                            });
  add_array<vtkDoubleArray>(fields, "weights, 6 x 6 [-, 1/m, m]", entries.size(), 36,
                            [&](std::size_t e, double* row) { put(entries[e].weights, row); });
}
} // namespace

void write_footprints(const std::filesystem::path& file, const ConfigurationSolution& configuration)
{
  vtkNew<vtkPolyData> data;
  add_footprint_nodes(*data, configuration);
  vtkFieldData& cells = *data->GetCellData();
  const std::size_t count = configuration.footprints.size();
  const std::vector<Tank>& tanks = configuration.craft.tanks;
  const auto tank = [&](std::size_t f) -> const Tank&
  { return tanks[static_cast<std::size_t>(configuration.feet[f].tank)]; };
  const auto collar = [&](std::size_t f) -> const Collar&
  { return tank(f).collars[static_cast<std::size_t>(configuration.feet[f].collar)]; };
  const auto foot = [&](std::size_t f) -> const Foot&
  { return collar(f).feet[static_cast<std::size_t>(configuration.feet[f].foot)]; };
  add_texts(cells, "tank", count, [&](std::size_t f) { return tank(f).name; });
  add_texts(cells, "collar", count, [&](std::size_t f) { return collar(f).name; });
  add_texts(cells, "foot", count, [&](std::size_t f) { return foot(f).name; });
  add_array<vtkDoubleArray>(cells, "point [m]", count, 3,
                            [&](std::size_t f, double* row)
                            { put(configuration.footprints[f].point, row); });
  add_array<vtkDoubleArray>(cells, "foot stiffness, forces [N/m], moments [N m/rad]", count, 6,
                            [&](std::size_t f, double* row)
                            { std::ranges::copy(foot(f).stiffness, row); });
  write_vtk<vtkXMLPolyDataWriter>(file, data.Get());
}

void write_tanks(const std::filesystem::path& file, const std::vector<Tank>& tanks)
{
  std::vector<std::vector<double>> positions;
  for (const Tank& tank : tanks)
    positions.push_back({0.0, (tank.axis_to - tank.axis_from).norm()});
  const TankShapes shapes = tank_shapes(tanks, positions);
  vtkFieldData& cells = *shapes.data->GetCellData();
  const std::size_t count = shapes.cell_tank.size();
  add_texts(cells, "tank", count, [&](std::size_t c) { return tanks[shapes.cell_tank[c]].name; });
  const auto add = [&](const char* name, const std::function<double(const Tank&)>& value)
  {
    add_array<vtkDoubleArray>(cells, name, count, 1,
                              [&](std::size_t c, double* row)
                              { *row = value(tanks[shapes.cell_tank[c]]); });
  };
  add("EA [N]", [](const Tank& t) { return t.axial_stiffness; });
  add("EI [N m^2]", [](const Tank& t) { return t.bending_stiffness; });
  add("GJ [N m^2]", [](const Tank& t)
      { return t.torsional_stiffness > 0.0 ? t.torsional_stiffness : t.bending_stiffness / 1.3; });
  add("GA [N]",
      [](const Tank& t) { return t.shear_stiffness > 0.0 ? t.shear_stiffness : unlimited; });
  add("diameter [m]", [](const Tank& t) { return t.diameter; });
  add("mass [kg]", [](const Tank& t) { return t.mass; });
  add("mass of contents [kg]", [](const Tank& t) { return t.contents_mass; });
  add("thermal expansion along [1/K]", [](const Tank& t) { return t.axial_expansion; });
  add("thermal expansion across [1/K]", [](const Tank& t) { return t.radial_expansion; });
  add("growth along by pressure [1/Pa]",
      [](const Tank& t) {
        return t.growth ? t.growth->length_change / t.growth->gauge_length / t.growth->pressure
                        : 0.0;
      });
  add("growth across by pressure [1/Pa]",
      [](const Tank& t) {
        return t.growth ? t.growth->diameter_change / t.growth->diameter / t.growth->pressure : 0.0;
      });
  write_vtk<vtkXMLPolyDataWriter>(file, shapes.data.Get());
}

void write_collars(const std::filesystem::path& file, const std::vector<Tank>& tanks)
{
  const std::vector<CollarOf> collars = all_collars(tanks);
  vtkNew<vtkPoints> points;
  vtkNew<vtkCellArray> vertices;
  points->SetDataTypeToDouble();
  for (const CollarOf& at : collars)
  {
    const vtkIdType id = points->InsertNextPoint(axis_point(*at.tank, at.collar->position).data());
    vertices->InsertNextCell(1, &id);
  }
  vtkNew<vtkPolyData> data;
  data->SetPoints(points);
  data->SetVerts(vertices);
  vtkFieldData& fields = *data->GetPointData();
  const std::size_t count = collars.size();
  add_texts(fields, "tank", count, [&](std::size_t c) { return collars[c].tank->name; });
  add_texts(fields, "collar", count, [&](std::size_t c) { return collars[c].collar->name; });
  add_texts(fields, "kind", count, [&](std::size_t c) { return word_of(collars[c].collar->kind); });
  add_texts(fields, "slides at", count,
            [&](std::size_t c) -> std::string
            {
              const Collar& collar = *collars[c].collar;
              return collar.kind == CollarKind::sliding ? word_of(collar.slides_at) : "";
            });
  for (int axis = 0; axis < 3; ++axis)
    add_array<vtkDoubleArray>(fields, axis_name(axis), count, 3,
                              [&](std::size_t c, double* row)
                              { put(tank_axes(*collars[c].tank).col(axis), row); });
  const auto add = [&](const char* name, const std::function<double(const Collar&)>& value)
  {
    add_array<vtkDoubleArray>(fields, name, count, 1,
                              [&](std::size_t c, double* row)
                              { *row = value(*collars[c].collar); });
  };
  add("position [m]", [](const Collar& c) { return c.position; });
  add_array<vtkDoubleArray>(fields, "pivot stiffness about axes 1 2 3 [N m/rad]", count, 3,
                            [&](std::size_t c, double* row)
                            {
                              for (std::size_t axis = 0; axis < 3; ++axis)
                                row[axis] =
                                    collars[c].collar->pivot_stiffness[axis].value_or(unlimited);
                            });
  add("ring radius [m]", [](const Collar& c) { return c.ring ? c.ring->radius : not_given; });
  add("lining width [m]", [](const Collar& c) { return c.ring ? c.ring->width : not_given; });
  add("lining bed stiffness [N/m^3]",
      [](const Collar& c) { return c.ring ? c.ring->bed_stiffness : not_given; });
  add("fitted preload [m]", [](const Collar& c) { return c.ring ? c.ring->preload : not_given; });
  add("tilt is rigid [0, 1]",
      [](const Collar& c) { return c.ring ? (c.ring->is_tilt_rigid ? 1.0 : 0.0) : not_given; });
  add("grip force, low [N]",
      [](const Collar& c) { return c.grip_force ? c.grip_force->low : unlimited; });
  add("grip force, high [N]",
      [](const Collar& c) { return c.grip_force ? c.grip_force->high : unlimited; });
  add("friction, low [-]", [](const Collar& c) { return c.friction.low; });
  add("friction, high [-]", [](const Collar& c) { return c.friction.high; });
  add("bolt preload of a foot [N]", [](const Collar& c) { return c.foot_bolt_preload; });
  add("stroke aft [m]", [](const Collar& c) { return c.stroke_aft.value_or(unlimited); });
  add("stroke forward [m]", [](const Collar& c) { return c.stroke_forward.value_or(unlimited); });
  add("stop stiffness [N/m]", [](const Collar& c) { return c.stop_stiffness.value_or(unlimited); });
  write_vtk<vtkXMLPolyDataWriter>(file, data.Get());
}
} // namespace carlin
