#include "vtk_arrays.hpp"
#include "write_vtk.hpp"

#include <limits>
#include <set>
#include <vtkCellData.h>
#include <vtkCellType.h>
#include <vtkDoubleArray.h>
#include <vtkIdTypeArray.h>
#include <vtkIntArray.h>
#include <vtkPointData.h>
#include <vtkPoints.h>
#include <vtkUnsignedCharArray.h>
#include <vtkUnstructuredGrid.h>
#include <vtkXMLUnstructuredGridWriter.h>

namespace carlin
{
namespace
{
constexpr double not_applicable = std::numeric_limits<double>::quiet_NaN();

/// Cells of the structure file in order: shells, members, joint springs.
struct CellKinds
{
  const Structure& structure;
  std::size_t shells = structure.shells.size();
  std::size_t members = structure.members.size();
  std::size_t all = shells + members + structure.joints.size();

  const Shell* shell(std::size_t cell) const
  {
    return cell < shells ? &structure.shells[cell] : nullptr;
  }
  const Member* member(std::size_t cell) const
  {
    return cell >= shells && cell < shells + members ? &structure.members[cell - shells] : nullptr;
  }
  const JointSpring* joint(std::size_t cell) const
  {
    return cell >= shells + members ? &structure.joints[cell - shells - members] : nullptr;
  }
};

void fill_rest(double* row, int components) { std::fill_n(row, components, not_applicable); }

void insert_cells(vtkUnstructuredGrid& grid, const Structure& structure)
{
  grid.Allocate(static_cast<vtkIdType>(CellKinds{structure}.all));
  for (const Shell& shell : structure.shells)
  {
    const std::array<vtkIdType, 4> ids{shell.nodes[0], shell.nodes[1], shell.nodes[2],
                                       shell.nodes[3]};
    const bool is_triangle = ids[3] == ids[2];
    grid.InsertNextCell(is_triangle ? VTK_TRIANGLE : VTK_QUAD, is_triangle ? 3 : 4, ids.data());
  }
  for (const Member& member : structure.members)
  {
    const std::array<vtkIdType, 2> ids{member.nodes[0], member.nodes[1]};
    grid.InsertNextCell(VTK_LINE, 2, ids.data());
  }
  for (const JointSpring& joint : structure.joints)
  {
    const std::array<vtkIdType, 2> ids{joint.node_part, joint.node_other};
    grid.InsertNextCell(VTK_LINE, 2, ids.data());
  }
}

/// A figure of shells alone; `value(shell, section, row)`.
template <typename Value>
void add_for_shells(vtkUnstructuredGrid& grid, const CellKinds& cells, const std::string& name,
                    int components, Value value)
{
  add_array<vtkDoubleArray>(
      *grid.GetCellData(), name, cells.all, components,
      [&](std::size_t cell, double* row)
      {
        if (const Shell* shell = cells.shell(cell))
          value(*shell, cells.structure.shell_sections[static_cast<std::size_t>(shell->section)],
                row);
        else
          fill_rest(row, components);
      });
}

template <typename Value>
void add_for_members(vtkUnstructuredGrid& grid, const CellKinds& cells, const std::string& name,
                     int components, Value value)
{
  add_array<vtkDoubleArray>(
      *grid.GetCellData(), name, cells.all, components,
      [&](std::size_t cell, double* row)
      {
        if (const Member* member = cells.member(cell))
          value(*member, cells.structure.member_sections[static_cast<std::size_t>(member->section)],
                row);
        else
          fill_rest(row, components);
      });
}

void add_names(vtkUnstructuredGrid& grid, const CellKinds& cells, const Mesh& mesh)
{
  vtkFieldData& data = *grid.GetCellData();
  add_array<vtkUnsignedCharArray>(data, "kind [0 shell, 1 member, 2 joint spring]", cells.all, 1,
                                  [&](std::size_t cell, unsigned char* row)
                                  {
                                    *row = static_cast<unsigned char>(
                                        cells.shell(cell) != nullptr    ? 0
                                        : cells.member(cell) != nullptr ? 1
                                                                        : 2);
                                  });
  const auto part = [&](std::size_t cell) -> Index
  {
    if (const Shell* shell = cells.shell(cell))
      return shell->part;
    const Member* member = cells.member(cell);
    return member != nullptr ? member->part : -1;
  };
  add_array<vtkIntArray>(data, "part number [-]", cells.all, 1,
                         [&](std::size_t cell, int* row) { *row = static_cast<int>(part(cell)); });
  add_texts(data, "part", cells.all,
            [&](std::size_t cell) -> std::string
            {
              if (const JointSpring* joint = cells.joint(cell))
                return mesh.joints[static_cast<std::size_t>(joint->joint)].name;
              return mesh.parts[static_cast<std::size_t>(part(cell))].name;
            });
  add_texts(*grid.GetFieldData(), "names of parts", mesh.parts.size(),
            [&](std::size_t p) { return mesh.parts[p].name; });
}

void add_shell_figures(vtkUnstructuredGrid& grid, const CellKinds& cells)
{
  const auto add = [&](const std::string& name, int components, auto value)
  { add_for_shells(grid, cells, name, components, value); };
  using Section = const ShellSection&;
  add("thickness [m]", 1, [](const Shell&, Section s, double* row) { *row = s.thickness; });
  add("middle from reference surface [m]", 1,
      [](const Shell&, Section s, double* row) { *row = s.offset; });
  add("A [N/m]", 9, [](const Shell&, Section s, double* row) { put(s.A, row); });
  add("B [N]", 9, [](const Shell&, Section s, double* row) { put(s.B, row); });
  add("D [N m]", 9, [](const Shell&, Section s, double* row) { put(s.D, row); });
  add("transverse shear stiffness [N/m]", 4,
      [](const Shell&, Section s, double* row) { put(s.shear, row); });
  add("drilling stiffness Gt [N/m]", 1,
      [](const Shell&, Section s, double* row) { *row = s.drilling_modulus; });
  add("thermal force [N/(m K)]", 3,
      [](const Shell&, Section s, double* row) { put(s.thermal_force, row); });
  add("thermal moment [N/K]", 3,
      [](const Shell&, Section s, double* row) { put(s.thermal_moment, row); });
  add("mass per area [kg/m^2]", 1,
      [](const Shell&, Section s, double* row) { *row = s.mass_per_area; });
}

void add_member_figures(vtkUnstructuredGrid& grid, const CellKinds& cells)
{
  const auto add = [&](const std::string& name, int components, auto value)
  { add_for_members(grid, cells, name, components, value); };
  using Section = const MemberSection&;
  add("EA [N]", 1, [](const Member&, Section s, double* row) { *row = s.axial_stiffness; });
  add("EI_y [N m^2]", 1,
      [](const Member&, Section s, double* row) { *row = s.bending_stiffness_y; });
  add("EI_z [N m^2]", 1,
      [](const Member&, Section s, double* row) { *row = s.bending_stiffness_z; });
  add("EI_yz [N m^2]", 1, [](const Member&, Section s, double* row) { *row = s.bending_product; });
  add("GJ [N m^2]", 1, [](const Member&, Section s, double* row) { *row = s.torsional_stiffness; });
  add("GA_y [N]", 1, [](const Member&, Section s, double* row) { *row = s.shear_stiffness_y; });
  add("GA_z [N]", 1, [](const Member&, Section s, double* row) { *row = s.shear_stiffness_z; });
  add("shear centre y z [m]", 2,
      [](const Member&, Section s, double* row)
      {
        row[0] = s.profile.shear_centre_y;
        row[1] = s.profile.shear_centre_z;
      });
  add("mass per length [kg/m]", 1,
      [](const Member&, Section s, double* row) { *row = s.mass_per_length; });
  add("thermal expansion [1/K]", 1,
      [](const Member&, Section s, double* row) { *row = s.thermal_expansion; });
  add("offset at first node [m]", 3,
      [](const Member& m, Section, double* row) { put(m.offset_1, row); });
  add("offset at second node [m]", 3,
      [](const Member& m, Section, double* row) { put(m.offset_2, row); });
}

void add_axes(vtkUnstructuredGrid& grid, const CellKinds& cells)
{
  const Structure& structure = cells.structure;
  std::vector<Matrix3> axes(cells.all, Matrix3::Identity());
  for (std::size_t cell = 0; cell < cells.all; ++cell)
  {
    if (const Shell* shell = cells.shell(cell))
      axes[cell] = shell_frame(shell_points(structure, *shell), material_axis(structure, *shell));
    else if (const Member* member = cells.member(cell))
      axes[cell] = member_frame(member_geometry(structure, *member)).axes;
    else if (const JointSpring* joint = cells.joint(cell))
      axes[cell] = joint->axes;
  }
  for (int axis = 0; axis < 3; ++axis)
    add_array<vtkDoubleArray>(
        *grid.GetCellData(), std::string("local ") + "xyz"[axis] + " axis [-]", cells.all, 3,
        [&](std::size_t cell, double* row) { put(axes[cell].col(axis), row); });
}

void add_joint_figures(vtkUnstructuredGrid& grid, const CellKinds& cells)
{
  add_array<vtkDoubleArray>(*grid.GetCellData(),
                            "joint stiffness along, across, normal [N/m], rotation [N m/rad]",
                            cells.all, 4,
                            [&](std::size_t cell, double* row)
                            {
                              if (const JointSpring* joint = cells.joint(cell))
                                std::ranges::copy(joint->stiffness, row);
                              else
                                fill_rest(row, 4);
                            });
  add_array<vtkDoubleArray>(*grid.GetCellData(), "joint length [m]", cells.all, 1,
                            [&](std::size_t cell, double* row)
                            {
                              const JointSpring* joint = cells.joint(cell);
                              *row = joint != nullptr ? joint->tributary_length : not_applicable;
                            });
}

/// Row sums of the consistent mass: its translations moved by one metre along x.
VectorX nodal_masses(const Structure& structure)
{
  const Index count = static_cast<Index>(structure.nodes.size());
  VectorX along_x = VectorX::Zero(structure.mass.cols());
  for (Index node = 0; node < count && along_x.size() > 0; ++node)
    along_x[freedoms_per_node * node] = 1.0;
  const VectorX inertia = structure.mass * along_x;
  VectorX masses = VectorX::Zero(count);
  for (Index node = 0; node < count && inertia.size() > 0; ++node)
    masses[node] = inertia[freedoms_per_node * node];
  return masses;
}

void add_node_figures(vtkUnstructuredGrid& grid, const ConfigurationSolution& configuration)
{
  const Structure& structure = *configuration.structure;
  vtkFieldData& data = *grid.GetPointData();
  const std::size_t count = structure.nodes.size();
  const VectorX masses = nodal_masses(structure);
  add_array<vtkDoubleArray>(data, "mass [kg]", count, 1,
                            [&](std::size_t node, double* row)
                            { *row = masses[static_cast<Index>(node)]; });
  add_array<vtkDoubleArray>(data, "shell area [m^2]", count, 1,
                            [&](std::size_t node, double* row)
                            {
                              const Index n = static_cast<Index>(node);
                              *row = n < structure.node_area.size() ? structure.node_area[n] : 0.0;
                            });
  std::vector<unsigned char> held(6 * count, 0);
  std::vector<double> motion(6 * count, 0.0), spring(6 * count, 0.0);
  if (configuration.solver)
    for (const Index freedom : configuration.solver->held_freedoms())
      held[static_cast<std::size_t>(freedom)] = 1;
  for (const SupportedFreedom& support : structure.supported)
  {
    const std::size_t freedom = static_cast<std::size_t>(support.freedom);
    motion[freedom] = support.motion;
    spring[freedom] = support.stiffness;
    held[freedom] = support.stiffness > 0.0 ? 0 : 1;
  }
  const auto add = [&]<typename Array, typename Number>(Array*, const char* name,
                                                        const std::vector<Number>& values)
  {
    add_array<Array>(data, name, count, 6,
                     [&](std::size_t node, Number* row)
                     { std::copy_n(values.data() + 6 * node, 6, row); });
  };
  add(static_cast<vtkUnsignedCharArray*>(nullptr), "held, u_x u_y u_z r_x r_y r_z [-]", held);
  if (structure.supported.empty())
    return;
  add(static_cast<vtkDoubleArray*>(nullptr), "imposed motion [m, rad]", motion);
  add(static_cast<vtkDoubleArray*>(nullptr), "spring to ground [N/m, N m/rad]", spring);
}
} // namespace

void write_structure(const std::filesystem::path& file, const ConfigurationSolution& configuration)
{
  const Structure& structure = *configuration.structure;
  const CellKinds cells{structure};
  vtkNew<vtkPoints> points;
  points->SetDataTypeToDouble();
  for (const Vector3& node : structure.nodes)
    points->InsertNextPoint(node.data());
  vtkNew<vtkUnstructuredGrid> grid;
  grid->SetPoints(points);
  insert_cells(*grid, structure);
  add_names(*grid, cells, *configuration.mesh);
  add_axes(*grid, cells);
  add_shell_figures(*grid, cells);
  add_member_figures(*grid, cells);
  add_joint_figures(*grid, cells);
  add_node_figures(*grid, configuration);
  write_vtk<vtkXMLUnstructuredGridWriter>(file, grid.Get());
}
} // namespace carlin
