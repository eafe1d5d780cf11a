#include "vtk_arrays.hpp"
#include "write_vtk.hpp"

#include <limits>
#include <vtkCellArray.h>
#include <vtkCellData.h>
#include <vtkCellType.h>
#include <vtkDoubleArray.h>
#include <vtkFloatArray.h>
#include <vtkIntArray.h>
#include <vtkPointData.h>
#include <vtkPoints.h>
#include <vtkUnstructuredGrid.h>
#include <vtkXMLUnstructuredGridWriter.h>

namespace carlin
{
namespace
{
constexpr float not_applicable = std::numeric_limits<float>::quiet_NaN();

/// The part of a nodal vector that belongs to translations (0) or rotations (3), as point vectors.
void add_nodal(vtkFieldData& data, const std::string& name, const VectorX& values, Index component)
{
  add_array<vtkDoubleArray>(data, name, static_cast<std::size_t>(values.size() / 6), 3,
                            [&](std::size_t node, double* row) {
                              put(values.segment<3>(6 * static_cast<Index>(node) + component), row);
                            });
}

void add_stresses(vtkFieldData& data, const Structure& structure, const StageSolution& stage)
{
  const std::size_t shells = structure.shells.size();
  const std::size_t cells = shells + structure.members.size();
  const std::vector<PlateStress> plates = plate_stresses(structure, stage);
  const auto add_plate = [&](const char* name, double PlateStress::*value)
  {
    add_array<vtkFloatArray>(data, name, cells, 1,
                             [&](std::size_t cell, float* row) {
                               *row = cell < shells ? static_cast<float>(plates[cell].*value)
                                                    : not_applicable;
                             });
  };
  add_plate("von Mises stress, middle [Pa]", &PlateStress::mid);
  add_plate("von Mises stress, inner face [Pa]", &PlateStress::inner);
  add_plate("von Mises stress, outer face [Pa]", &PlateStress::outer);
  const std::vector<MemberStress> members = member_stresses(structure, stage);
  const auto add_member = [&](const char* name, double MemberStress::*value)
  {
    add_array<vtkFloatArray>(data, name, cells, 1,
                             [&](std::size_t cell, float* row) {
                               *row = cell < shells
                                          ? not_applicable
                                          : static_cast<float>(members[cell - shells].*value);
                             });
  };
  add_member("member stress, axial and bending [Pa]", &MemberStress::nominal);
  add_member("member stress, shear [Pa]", &MemberStress::shear);

  std::vector<float> pressure(cells, 0.0F);
  for (const auto& [shell, value] : stage.shell_pressures)
    pressure[static_cast<std::size_t>(shell)] += static_cast<float>(value);
  add_array<vtkFloatArray>(data, "pressure along inward normal [Pa]", cells, 1,
                           [&](std::size_t cell, float* row) { *row = pressure[cell]; });
}
} // namespace

RigidMotion rigid_motion(const std::vector<Vector3>& points,
                         const std::vector<Vector3>& displacements)
{
  RigidMotion motion;
  if (points.empty())
    return motion;
  Vector3 centre = Vector3::Zero();
  for (const Vector3& point : points)
    centre += point / static_cast<double>(points.size());
  // Unknowns (translation of the centre, rotation); points in line leave the turn about the line
  // open, for which the decomposition takes none.
  Matrix6 normal = Matrix6::Zero();
  Vector6 right = Vector6::Zero();
  for (std::size_t p = 0; p < points.size(); ++p)
  {
    const Vector3 arm = points[p] - centre;
    Eigen::Matrix<double, 3, 6> row = Eigen::Matrix<double, 3, 6>::Zero();
    row.leftCols<3>().setIdentity();
    row.rightCols<3>() << 0.0, arm.z(), -arm.y(), -arm.z(), 0.0, arm.x(), arm.y(), -arm.x(), 0.0;
    normal += row.transpose() * row;
    right += row.transpose() * displacements[p];
  }
  Eigen::CompleteOrthogonalDecomposition<Matrix6> decomposition;
  decomposition.setThreshold(1e-10);
  const Vector6 found = decomposition.compute(normal).solve(right);
  motion.rotation = found.tail<3>();
  motion.translation = found.head<3>() - motion.rotation.cross(centre);
  return motion;
}

struct StageWriter::Impl
{
  const ConfigurationSolution& configuration;
  vtkNew<vtkUnstructuredGrid> geometry; ///< shells, then members; what every stage shares
};

StageWriter::StageWriter(const ConfigurationSolution& configuration)
    : impl_(new Impl{configuration, {}})
{
  const Structure& structure = *configuration.structure;
  vtkNew<vtkPoints> points;
  points->SetDataTypeToFloat(); // for looking; structure.vtu has them in full
  for (const Vector3& node : structure.nodes)
    points->InsertNextPoint(node.data());
  vtkNew<vtkCellArray> cells;
  cells->Use32BitStorage();
  std::vector<int> types;
  for (const Shell& shell : structure.shells)
  {
    const bool is_triangle = shell.nodes[3] == shell.nodes[2];
    cells->InsertNextCell(is_triangle ? 3 : 4);
    for (std::size_t corner = 0; corner < (is_triangle ? 3U : 4U); ++corner)
      cells->InsertCellPoint(shell.nodes[corner]);
    types.push_back(is_triangle ? VTK_TRIANGLE : VTK_QUAD);
  }
  for (const Member& member : structure.members)
  {
    cells->InsertNextCell(2);
    cells->InsertCellPoint(member.nodes[0]);
    cells->InsertCellPoint(member.nodes[1]);
    types.push_back(VTK_LINE);
  }
  impl_->geometry->SetPoints(points);
  impl_->geometry->SetCells(types.data(), cells);
  const std::size_t shells = structure.shells.size();
  add_array<vtkIntArray>(*impl_->geometry->GetCellData(), "part number [-]", types.size(), 1,
                         [&](std::size_t cell, int* row)
                         {
                           *row = static_cast<int>(cell < shells
                                                       ? structure.shells[cell].part
                                                       : structure.members[cell - shells].part);
                         });
}

StageWriter::~StageWriter() = default;

RigidMotion StageWriter::write(const std::filesystem::path& file, const StageSolution& stage) const
{
  const Structure& structure = *impl_->configuration.structure;
  const VectorX shown = shape_shown(structure, stage.displacement);
  vtkNew<vtkUnstructuredGrid> grid;
  grid->ShallowCopy(impl_->geometry);
  vtkFieldData& points = *grid->GetPointData();
  add_array<vtkFloatArray>(points, "displacement [m]", structure.nodes.size(), 3,
                           [&](std::size_t node, float* row)
                           { put(shown.segment<3>(6 * static_cast<Index>(node)), row); });
  add_nodal(points, "displacement as solved [m]", stage.displacement, 0);
  add_nodal(points, "rotation as solved [rad]", stage.displacement, 3);
  add_nodal(points, "applied force [N]", stage.applied, 0);
  add_nodal(points, "applied moment [N m]", stage.applied, 3);
  add_stresses(*grid->GetCellData(), structure, stage);
  write_vtk<vtkXMLUnstructuredGridWriter>(file, grid.Get());

  std::vector<Vector3> taken_off;
  for (std::size_t node = 0; node < structure.nodes.size(); ++node)
  {
    const Index first = 6 * static_cast<Index>(node);
    taken_off.emplace_back(stage.displacement.segment<3>(first) - shown.segment<3>(first));
  }
  return rigid_motion(structure.nodes, taken_off);
}
} // namespace carlin
