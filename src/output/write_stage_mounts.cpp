#include "tank_shapes.hpp"
#include "vtk_arrays.hpp"
#include "write_vtk.hpp"

#include <functional>
#include <limits>
#include <vtkCellArray.h>
#include <vtkCellData.h>
#include <vtkDoubleArray.h>
#include <vtkFloatArray.h>
#include <vtkIntArray.h>
#include <vtkPointData.h>
#include <vtkPoints.h>
#include <vtkPolyData.h>
#include <vtkXMLPolyDataWriter.h>

namespace carlin
{
namespace
{
/// Displacement of a foot with the hull, read through its footprint [m].
Vector3 foot_displacement(const Footprint& footprint, const VectorX& displacement)
{
  const Vector6 reading = footprint.weights.transpose() * displacement;
  return reading.head<3>();
}

/// A collar or a foot as a point with what acts there.
struct MountPoint
{
  std::string tank, collar, foot; ///< foot: empty for the collar itself
  Vector3 at = Vector3::Zero(), displacement = Vector3::Zero();
  std::array<Vector6, 2> force{Vector6::Zero(), Vector6::Zero()}; ///< low, high, global axes
  std::array<const CollarResult*, 2> results{nullptr, nullptr};   ///< low, high
  bool is_foot() const { return !foot.empty(); }
};

/// Force from tank axes to global.
Vector6 to_global(const Matrix3& axes, const Vector6& force)
{
  Vector6 global;
  global << axes * force.head<3>(), axes * force.tail<3>();
  return global;
}

std::vector<MountPoint> mount_points(const ConfigurationSolution& configuration,
                                     const StageSolution& stage, const ShownMotion& motion)
{
  const std::array<const MountStageResult*, 2> ends{&stage.mounts_low, &stage.mounts_high};
  const auto result_at = [&](std::size_t end, std::size_t t, std::size_t c) -> const CollarResult*
  { return t < ends[end]->tanks.size() ? &ends[end]->tanks[t].collars[c] : nullptr; };
  const std::vector<Tank>& tanks = configuration.craft.tanks;
  std::vector<MountPoint> points;
  for (std::size_t t = 0; t < tanks.size(); ++t)
    for (std::size_t c = 0; c < tanks[t].collars.size(); ++c)
    {
      MountPoint point{tanks[t].name, tanks[t].collars[c].name, ""};
      point.at = axis_point(tanks[t], tanks[t].collars[c].position);
      for (std::size_t end = 0; end < 2; ++end)
        if (const CollarResult* result = result_at(end, t, c))
        {
          point.results[end] = result;
          point.force[end] = to_global(tank_axes(tanks[t]), result->force);
          point.displacement = result->displacement + motion.at_fitting[t].at(point.at) -
                               motion.taken_off.at(point.at);
        }
      points.push_back(point);
    }
  for (std::size_t f = 0; f < configuration.feet.size(); ++f)
  {
    const FootRef& ref = configuration.feet[f];
    const auto t = static_cast<std::size_t>(ref.tank), c = static_cast<std::size_t>(ref.collar);
    const auto k = static_cast<std::size_t>(ref.foot);
    const Collar& collar = tanks[t].collars[c];
    MountPoint point{tanks[t].name, collar.name, collar.feet[k].name};
    if (point.foot.empty())
      point.foot = "foot-" + std::to_string(k + 1);
    point.at = ref.point;
    for (std::size_t end = 0; end < 2; ++end)
      if (const CollarResult* result = result_at(end, t, c))
        if (k < result->foot_forces.size())
          point.force[end] = result->foot_forces[k];
    if (f < configuration.footprints.size() && stage.displacement.size() > 0)
      point.displacement = foot_displacement(configuration.footprints[f], stage.displacement) -
                           motion.taken_off.at(point.at);
    points.push_back(point);
  }
  return points;
}

void add_collar_figures(vtkFieldData& fields, const std::vector<MountPoint>& points,
                        std::size_t end)
{
  const std::string suffix = end == 0 ? ", low " : ", high ";
  const auto add_vector = [&](const std::string& name, bool of_foot, Index component)
  {
    add_array<vtkDoubleArray>(fields, name, points.size(), 3,
                              [&](std::size_t p, double* row)
                              {
                                const Vector3 force = points[p].force[end].segment<3>(component);
                                put(points[p].is_foot() == of_foot ? force : Vector3::Zero().eval(),
                                    row);
                              });
  };
  add_vector("collar force on tank" + suffix + "[N]", false, 0);
  add_vector("collar moment on tank" + suffix + "[N m]", false, 3);
  add_vector("foot force on hull" + suffix + "[N]", true, 0);
  add_vector("foot moment on hull" + suffix + "[N m]", true, 3);
  const auto add = [&](const std::string& name, const char* unit, double CollarResult::*value)
  {
    add_array<vtkDoubleArray>(fields, name + suffix + unit, points.size(), 1,
                              [&](std::size_t p, double* row)
                              {
                                const CollarResult* result = points[p].results[end];
                                *row = result != nullptr ? result->*value
                                                         : std::numeric_limits<double>::quiet_NaN();
                              });
  };
  add("clamping force", "[N]", &CollarResult::clamping_force);
  add("friction or grip limit", "[N]", &CollarResult::friction_limit);
  add("friction or grip force along", "[N]", &CollarResult::friction_force);
  add("stop force along", "[N]", &CollarResult::stop_force);
  add("slip", "[m]", &CollarResult::slip);
  add("stroke left aft", "[m]", &CollarResult::stroke_left_aft);
  add("stroke left forward", "[m]", &CollarResult::stroke_left_forward);
  add("peak lining pressure", "[Pa]", &CollarResult::peak_lining_pressure);
}
} // namespace

std::vector<RigidMotion> motion_at_fitting(const ConfigurationSolution& configuration,
                                           const StageSolution& fitting)
{
  const std::size_t tanks = configuration.craft.tanks.size();
  std::vector<std::vector<Vector3>> points(tanks), displacements(tanks);
  for (std::size_t f = 0; f < configuration.footprints.size(); ++f)
  {
    if (fitting.displacement.size() == 0)
      break;
    const FootRef& ref = configuration.feet[f];
    points[static_cast<std::size_t>(ref.tank)].push_back(ref.point);
    displacements[static_cast<std::size_t>(ref.tank)].push_back(
        foot_displacement(configuration.footprints[f], fitting.displacement));
  }
  std::vector<RigidMotion> motions;
  for (std::size_t t = 0; t < tanks; ++t)
    motions.push_back(rigid_motion(points[t], displacements[t]));
  return motions;
}

void write_stage_tanks(const std::filesystem::path& file,
                       const ConfigurationSolution& configuration, const StageSolution& stage,
                       const ShownMotion& motion)
{
  const std::vector<Tank>& tanks = configuration.craft.tanks;
  const std::vector<TankResult>& results = stage.mounts_high.tanks;
  std::vector<std::vector<double>> positions(tanks.size());
  for (std::size_t t = 0; t < results.size(); ++t)
    for (const TankSection& section : results[t].sections)
      positions[t].push_back(section.position);
  const TankShapes shapes = tank_shapes(tanks, positions);
  const auto section_of = [&](std::size_t p) -> const TankSection&
  { return results[shapes.points[p].tank].sections[shapes.points[p].section]; };

  vtkFieldData& fields = *shapes.data->GetPointData();
  const std::size_t count = shapes.points.size();
  add_array<vtkFloatArray>(fields, "displacement [m]", count, 3,
                           [&](std::size_t p, float* row)
                           {
                             const std::size_t t = shapes.points[p].tank;
                             const Vector3 at = axis_point(tanks[t], shapes.points[p].position);
                             put(section_of(p).displacement + motion.at_fitting[t].at(at) -
                                     motion.taken_off.at(at),
                                 row);
                           });
  add_array<vtkDoubleArray>(fields, "displacement from fitting [m]", count, 3,
                            [&](std::size_t p, double* row)
                            { put(section_of(p).displacement, row); });
  add_array<vtkDoubleArray>(fields, "axial force, compression + [N]", count, 1,
                            [&](std::size_t p, double* row) { *row = section_of(p).axial_force; });
  add_array<vtkDoubleArray>(fields, "shear force across, upright [N]", count, 2,
                            [&](std::size_t p, double* row) { put(section_of(p).shear, row); });
  add_array<vtkDoubleArray>(fields, "torsion [N m]", count, 1,
                            [&](std::size_t p, double* row) { *row = section_of(p).torsion; });
  add_array<vtkDoubleArray>(fields, "bending moment about across, upright [N m]", count, 2,
                            [&](std::size_t p, double* row) { put(section_of(p).bending, row); });
  add_array<vtkIntArray>(*shapes.data->GetCellData(), "tank number [-]", shapes.cell_tank.size(), 1,
                         [&](std::size_t c, int* row)
                         { *row = static_cast<int>(shapes.cell_tank[c]); });
  add_texts(*shapes.data->GetFieldData(), "names of tanks", tanks.size(),
            [&](std::size_t t) { return tanks[t].name; });
  write_vtk<vtkXMLPolyDataWriter>(file, shapes.data.Get());
}

void write_stage_collars(const std::filesystem::path& file,
                         const ConfigurationSolution& configuration, const StageSolution& stage,
                         const ShownMotion& motion)
{
  const std::vector<MountPoint> mounts = mount_points(configuration, stage, motion);
  vtkNew<vtkPoints> points;
  vtkNew<vtkCellArray> vertices;
  points->SetDataTypeToDouble();
  for (const MountPoint& mount : mounts)
  {
    const vtkIdType id = points->InsertNextPoint(mount.at.data());
    vertices->InsertNextCell(1, &id);
  }
  vtkNew<vtkPolyData> data;
  data->SetPoints(points);
  data->SetVerts(vertices);
  vtkFieldData& fields = *data->GetPointData();
  add_array<vtkDoubleArray>(fields, "displacement [m]", mounts.size(), 3,
                            [&](std::size_t p, double* row) { put(mounts[p].displacement, row); });
  add_texts(fields, "tank", mounts.size(), [&](std::size_t p) { return mounts[p].tank; });
  add_texts(fields, "collar", mounts.size(), [&](std::size_t p) { return mounts[p].collar; });
  add_texts(fields, "foot", mounts.size(), [&](std::size_t p) { return mounts[p].foot; });
  for (const std::size_t end : {0U, 1U})
    add_collar_figures(fields, mounts, end);
  write_vtk<vtkXMLPolyDataWriter>(file, data.Get());
}
} // namespace carlin
