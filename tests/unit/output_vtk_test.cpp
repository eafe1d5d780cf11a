#include "output_sample.hpp"
#include "vtk_arrays.hpp"
#include "write_vtk.hpp"

#include <catch2/catch.hpp>
#include <vtkCell.h>
#include <vtkCellData.h>
#include <vtkDataArray.h>
#include <vtkMultiBlockDataSet.h>
#include <vtkNew.h>
#include <vtkPointData.h>
#include <vtkPolyData.h>
#include <vtkStringArray.h>
#include <vtkUnstructuredGrid.h>
#include <vtkXMLMultiBlockDataReader.h>
#include <vtkXMLPolyDataReader.h>
#include <vtkXMLUnstructuredGridReader.h>
#include <vtkXMLUnstructuredGridWriter.h>

using namespace carlin;
using Catch::Matchers::Contains;
namespace fs = std::filesystem;

namespace
{
vtkSmartPointer<vtkUnstructuredGrid> read_grid(const fs::path& file)
{
  vtkNew<vtkXMLUnstructuredGridReader> reader;
  reader->SetFileName(file.c_str());
  reader->Update();
  return reader->GetOutput();
}

vtkSmartPointer<vtkPolyData> read_poly(const fs::path& file)
{
  vtkNew<vtkXMLPolyDataReader> reader;
  reader->SetFileName(file.c_str());
  reader->Update();
  return reader->GetOutput();
}

std::vector<double> row(vtkFieldData* data, const char* name, vtkIdType tuple)
{
  vtkDataArray* array = data->GetArray(name);
  INFO(name);
  REQUIRE(array != nullptr);
  REQUIRE(tuple < array->GetNumberOfTuples());
  std::vector<double> values(static_cast<std::size_t>(array->GetNumberOfComponents()));
  array->GetTuple(tuple, values.data());
  return values;
}

std::string text(vtkFieldData* data, const char* name, vtkIdType value)
{
  auto* array = vtkStringArray::SafeDownCast(data->GetAbstractArray(name));
  INFO(name);
  REQUIRE(array != nullptr);
  return array->GetValue(value);
}

using Row = std::vector<double>;
} // namespace

TEST_CASE("structure.vtu gives back what was solved", "[unit][output][vtk]")
{
  const TestFolder folder("structure");
  const RunResult result = sample_result();
  const Structure& structure = *result.configurations[1].structure;
  write_results(folder.path() / "r", result);
  const auto grid = read_grid(folder.path() / "r/vtk/converted/structure.vtu");
  REQUIRE(grid->GetNumberOfPoints() == 8);
  REQUIRE(grid->GetNumberOfCells() == 5); // 3 shells, 1 member, 1 joint spring
  CHECK(grid->GetPoint(3)[2] == 0.1);
  CHECK(grid->GetCellType(1) == VTK_QUAD);
  CHECK(grid->GetCellType(2) == VTK_TRIANGLE);
  CHECK(grid->GetCell(1)->GetPointId(3) == 4);

  vtkFieldData* cells = grid->GetCellData();
  CHECK(text(cells, "part", 2) == "hatch \"A\", port");
  CHECK(text(cells, "part", 4) == "hatch-edge");
  CHECK(row(cells, "thickness [m]", 1) == Row{0.006});
  CHECK(row(cells, "A [N/m]", 0) == Row{4.0e8, 1.2e8, 0.0, 1.2e8, 4.0e8, 0.0, 0.0, 0.0, 1.4e8});
  CHECK(row(cells, "B [N]", 0)[8] == structure.shell_sections[0].B(2, 2));
  CHECK(row(cells, "transverse shear stiffness [N/m]", 0) == Row{1.1e8, 0.0, 0.0, 1.1e8});
  CHECK(std::isnan(row(cells, "thickness [m]", 3)[0]));
  CHECK(row(cells, "offset at second node [m]", 3) == Row{0.0, 0.0, 0.05});
  CHECK(row(cells, "EA [N]", 3)[0] == Approx(70.0e9 * 0.07 * 0.007).epsilon(1e-12)); // R
  CHECK(std::isinf(row(cells, "GA_y [N]", 3)[0]));
  CHECK(row(cells, "joint stiffness along, across, normal [N/m], rotation [N m/rad]", 4) ==
        Row{1e6, 2e6, 3e6, 4e3});
  CHECK(row(cells, "local z axis [-]", 1) == Row{0.0, 0.0, 1.0});

  vtkFieldData* points = grid->GetPointData();
  CHECK(row(points, "mass [kg]", 5) == Row{7.0});
  CHECK(points->GetArray("spring to ground [N/m, N m/rad]") == nullptr); // it floats
  const auto base = read_grid(folder.path() / "r/vtk/as-built/structure.vtu");
  vtkFieldData* held = base->GetPointData();
  CHECK(row(held, "held, u_x u_y u_z r_x r_y r_z [-]", 0) == Row{1, 0, 0, 0, 0, 0});
  CHECK(row(held, "imposed motion [m, rad]", 0)[0] == 0.001);
  CHECK(row(held, "spring to ground [N/m, N m/rad]", 0)[1] == 5e5);
}

TEST_CASE("A stage file gives back forces and displacement to the last bit", "[unit][output][vtk]")
{
  const TestFolder folder("stage");
  const RunResult result = sample_result();
  const ConfigurationSolution& converted = result.configurations[1];
  write_results(folder.path() / "r", result);
  const auto grid =
      read_grid(folder.path() / "r/vtk/converted/landing--midships/landing---hard.vtu");
  REQUIRE(grid->GetNumberOfPoints() == 8);
  REQUIRE(grid->GetNumberOfCells() == 4);
  vtkFieldData* points = grid->GetPointData();
  const VectorX expected = sample_displacement();
  for (vtkIdType node = 0; node < 8; ++node)
  {
    const Row found = row(points, "displacement as solved [m]", node);
    for (Index axis = 0; axis < 3; ++axis)
      CHECK(found[static_cast<std::size_t>(axis)] == expected[6 * node + axis]);
  }
  CHECK(row(points, "applied force [N]", 4) == Row{0.0, 0.0, 1234.5});
  CHECK(row(points, "applied moment [N m]", 4) == Row{-7.25, 0.0, 0.0});
  const VectorX shown = shape_shown(*converted.structure, expected);
  // P: float for looking, 24 bits.
  CHECK(row(points, "displacement [m]", 4)[2] == Approx(shown[6 * 4 + 2]).epsilon(1e-7));
  vtkFieldData* cells = grid->GetCellData();
  CHECK(row(cells, "pressure along inward normal [Pa]", 1) == Row{3.0e4});
  const std::vector<PlateStress> plates =
      plate_stresses(*converted.structure, converted.cases[0].stages[1]);
  CHECK(row(cells, "von Mises stress, outer face [Pa]", 1)[0] ==
        Approx(plates[1].outer).epsilon(1e-6)); // P: float
  CHECK(std::isnan(row(cells, "von Mises stress, outer face [Pa]", 3)[0]));
}

TEST_CASE("Tanks are tubes that move with the hull shown, collars carry their forces",
          "[unit][output][vtk]")
{
  const TestFolder folder("tanks");
  const RunResult result = sample_result();
  write_results(folder.path() / "r", result);
  const fs::path stage = folder.path() / "r/vtk/converted/landing--midships";
  const auto tanks = read_poly(stage / "landing---hard-tanks.vtp");
  REQUIRE(tanks->GetNumberOfLines() == 1);
  REQUIRE(tanks->GetNumberOfPoints() == 5 + 5 * 24);
  CHECK(tanks->GetNumberOfPolys() == 3 * 24 + 2); // no surface between the two sides of a collar
  double bounds[6];
  tanks->GetBounds(bounds);
  CHECK(bounds[5] - bounds[4] == Approx(0.5).epsilon(1e-6)); // diameter
  CHECK(row(tanks->GetPointData(), "axial force, compression + [N]", 3) == Row{900.0});
  const Row moved = row(tanks->GetPointData(), "displacement from fitting [m]", 4);
  CHECK(moved == Row{0.002, 0.0, -0.001});
  // The hull shown has a rigid motion taken off; so has the tank, at its own place.
  const Structure& structure = *result.configurations[1].structure;
  const VectorX difference = sample_displacement() - shape_shown(structure, sample_displacement());
  std::vector<Vector3> taken_off;
  for (Index node = 0; node < 8; ++node)
    taken_off.emplace_back(difference.segment<3>(6 * node));
  const Vector3 expected = Vector3(0.002, 0.0, -0.001) -
                           rigid_motion(structure.nodes, taken_off).at(Vector3(2.0, 0.5, 0.5));
  const Row displayed = row(tanks->GetPointData(), "displacement [m]", 4);
  CHECK(expected.norm() > 0.01); // else the test shows nothing
  for (std::size_t axis = 0; axis < 3; ++axis)
    CHECK(displayed[axis] == Approx(expected[static_cast<Index>(axis)]).epsilon(1e-6)); // P: float

  const auto collars = read_poly(stage / "landing---hard-collars.vtp");
  REQUIRE(collars->GetNumberOfPoints() == 4); // two collars, two feet
  vtkFieldData* points = collars->GetPointData();
  CHECK(row(points, "collar force on tank, high [N]", 0) == Row{-900.0, 10.0, 600.0});
  CHECK(row(points, "collar force on tank, high [N]", 2) == Row{0.0, 0.0, 0.0});
  CHECK(row(points, "foot force on hull, low [N]", 3) == Row{5.0, 5.0, 5.0});
  CHECK(row(points, "clamping force, low [N]", 1) == Row{6000.0});
  CHECK(text(points, "foot", 2) == "port");

  const auto footprints = read_poly(folder.path() / "r/vtk/converted/footprints.vtp");
  REQUIRE(footprints->GetNumberOfVerts() == 2);
  CHECK(row(footprints->GetPointData(), "node [-]", 1) == Row{2});
  CHECK(row(footprints->GetPointData(), "weights, 6 x 6 [-, 1/m, m]", 1)[7] == 1.0);
  CHECK(row(footprints->GetCellData(), "point [m]", 1) == Row{1.75, 0.5, 0.0});
  const auto beams = read_poly(folder.path() / "r/vtk/converted/tanks.vtp");
  CHECK(row(beams->GetCellData(), "GJ [N m^2]", 0)[0] == Approx(6.6e7 / 1.3).epsilon(1e-12));
  const auto holders = read_poly(folder.path() / "r/vtk/converted/collars.vtp");
  CHECK(row(holders->GetPointData(), "stroke aft [m]", 0) == Row{0.012});
  CHECK(text(holders->GetPointData(), "slides at", 0) == "lining");
}

TEST_CASE("A block file opens structure, tanks and collars of a stage together",
          "[unit][output][vtk]")
{
  const TestFolder folder("blocks");
  write_results(folder.path() / "r", sample_result());
  const fs::path stage = folder.path() / "r/vtk/converted/landing--midships";
  vtkNew<vtkXMLMultiBlockDataReader> reader;
  reader->SetFileName((stage / "landing---hard.vtm").c_str());
  reader->Update();
  auto* blocks = vtkMultiBlockDataSet::SafeDownCast(reader->GetOutput());
  REQUIRE(blocks != nullptr);
  REQUIRE(blocks->GetNumberOfBlocks() == 3);
  CHECK(vtkUnstructuredGrid::SafeDownCast(blocks->GetBlock(0))->GetNumberOfPoints() == 8);
  CHECK(vtkPolyData::SafeDownCast(blocks->GetBlock(2))->GetNumberOfPoints() == 4);
  CHECK_THAT(content(stage / "stages.pvd"),
             Contains("timestep=\"1\" group=\"\" part=\"0\" name=\"structure\" "
                      "file=\"landing---hard.vtu\""));
  CHECK_THAT(content(folder.path() / "r/vtk/contents.csv"),
             Contains("converted,judged,\"landing, midships\",landing / hard,1,tanks,"
                      "converted/landing--midships/landing---hard-tanks.vtp"));
}

TEST_CASE("A VTK file that cannot be written is an error with its name", "[unit][output][vtk]")
{
  vtkObject::GlobalWarningDisplayOff();
  vtkNew<vtkUnstructuredGrid> grid;
  CHECK_THROWS_WITH(write_vtk<vtkXMLUnstructuredGridWriter>("/nowhere/x.vtu", grid.Get()),
                    Contains("/nowhere/x.vtu: cannot be written ("));
}

TEST_CASE("The rigid motion of points is found again", "[unit][output]")
{
  const Vector3 shift(0.01, 0.02, -0.03), turn(0.001, -0.002, 0.003);
  std::vector<Vector3> points{{0, 0, 0}, {3, 0, 0}, {0, 2, 0}, {1, 1, 4}}, moved;
  for (const Vector3& point : points)
    moved.emplace_back(shift + turn.cross(point));
  const RigidMotion motion = rigid_motion(points, moved);
  CHECK((motion.rotation - turn).norm() < 1e-14); // R
  CHECK((motion.translation - shift).norm() < 1e-14);
  // On a line the turn about it is open and none is taken.
  const RigidMotion line = rigid_motion({{0, 0, 0}, {2, 0, 0}}, {{0, 0, 0}, {0, 0, 0.02}});
  CHECK((line.rotation - Vector3(0.0, -0.01, 0.0)).norm() < 1e-14);
}
