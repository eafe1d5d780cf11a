#include "csv.hpp"
#include "json.hpp"
#include "names.hpp"
#include "staged_folder.hpp"
#include "vtk_arrays.hpp"
#include "write_vtk.hpp"

#include <cstdint>
#include <vtkCellArray.h>
#include <vtkCellData.h>
#include <vtkCellType.h>
#include <vtkIntArray.h>
#include <vtkPointData.h>
#include <vtkPoints.h>
#include <vtkPolyData.h>
#include <vtkUnstructuredGrid.h>
#include <vtkXMLPolyDataWriter.h>
#include <vtkXMLUnstructuredGridWriter.h>

namespace carlin
{
namespace
{
namespace fs = std::filesystem;

void write_planes(const fs::path& folder, const std::vector<Lattice::ResolvedPlane>& planes)
{
  vtkNew<vtkPoints> points;
  vtkNew<vtkCellArray> lines;
  points->SetDataTypeToDouble();
  CsvTable table({"kind", "name", "point", "x [m]", "y [m]", "z [m]"});
  for (const Lattice::ResolvedPlane& plane : planes)
  {
    lines->InsertNextCell(static_cast<int>(plane.line.size()));
    for (std::size_t p = 0; p < plane.line.size(); ++p)
    {
      const Vector3& at = plane.line[p];
      lines->InsertCellPoint(points->InsertNextPoint(at.data()));
      table.add({plane.kind, plane.name, std::to_string(p + 1), at.x(), at.y(), at.z()});
    }
  }
  vtkNew<vtkPolyData> data;
  data->SetPoints(points);
  data->SetLines(lines);
  add_texts(*data->GetCellData(), "kind", planes.size(),
            [&](std::size_t p) { return planes[p].kind; });
  add_texts(*data->GetCellData(), "name", planes.size(),
            [&](std::size_t p) { return planes[p].name; });
  write_vtk<vtkXMLPolyDataWriter>(folder / "planes.vtp", data.Get());
  write_text(folder / "planes.csv", table.text());
}

/// Cells, then segments of runs; only the points they use.
void write_parts(const fs::path& file, const Mesh& mesh)
{
  vtkNew<vtkPoints> points;
  points->SetDataTypeToDouble();
  std::vector<vtkIdType> number(mesh.points.size(), -1);
  const auto point = [&](Index p)
  {
    vtkIdType& id = number[static_cast<std::size_t>(p)];
    if (id < 0)
      id = points->InsertNextPoint(mesh.points[static_cast<std::size_t>(p)].data());
    return id;
  };
  vtkNew<vtkUnstructuredGrid> grid;
  std::vector<Index> part_of;
  for (const Cell& cell : mesh.cells)
  {
    const int corners = cell.is_triangle() ? 3 : 4;
    std::array<vtkIdType, 4> ids{};
    for (std::size_t corner = 0; corner < static_cast<std::size_t>(corners); ++corner)
      ids[corner] = point(cell.points[corner]);
    grid->InsertNextCell(corners == 3 ? VTK_TRIANGLE : VTK_QUAD, corners, ids.data());
    part_of.push_back(cell.part);
  }
  for (const Run& run : mesh.runs)
    for (std::size_t p = 0; p + 1 < run.points.size(); ++p)
    {
      const std::array<vtkIdType, 2> ids{point(run.points[p]), point(run.points[p + 1])};
      grid->InsertNextCell(VTK_LINE, 2, ids.data());
      part_of.push_back(run.part);
    }
  grid->SetPoints(points);
  const auto part = [&](std::size_t cell) -> const MeshPart&
  { return mesh.parts[static_cast<std::size_t>(part_of[cell])]; };
  vtkFieldData& fields = *grid->GetCellData();
  add_array<vtkIntArray>(fields, "part number [-]", part_of.size(), 1,
                         [&](std::size_t c, int* row) { *row = static_cast<int>(part_of[c]); });
  add_texts(fields, "part", part_of.size(), [&](std::size_t c) { return part(c).name; });
  add_texts(fields, "schedule or profile", part_of.size(),
            [&](std::size_t c) { return part(c).material_use; });
  write_vtk<vtkXMLUnstructuredGridWriter>(file, grid.Get());
}

struct Bearing
{
  std::string what;
  const FootprintArea* area;
};

std::vector<Bearing> bearings(const ConfiguredCraft& craft)
{
  std::vector<Bearing> all;
  for (const Tank& tank : craft.tanks)
    for (const Collar& collar : tank.collars)
      for (const Foot& foot : collar.feet)
        all.push_back({tank.name + ", " + collar.name + ", " + foot.name, &foot.footprint});
  for (const Equipment& equipment : craft.equipment)
    for (const FootprintArea& area : equipment.footprints)
      all.push_back({equipment.name, &area});
  return all;
}

/// Where equipment and feet bear: a point, and the rectangle of the footprint as seen from above.
void write_feet(const fs::path& file, const ConfiguredCraft& craft)
{
  const std::vector<Bearing> all = bearings(craft);
  vtkNew<vtkPoints> points;
  vtkNew<vtkCellArray> vertices, outlines;
  points->SetDataTypeToDouble();
  for (const Bearing& bearing : all)
  {
    const vtkIdType id = points->InsertNextPoint(bearing.area->centre.data());
    vertices->InsertNextCell(1, &id);
  }
  for (const Bearing& bearing : all)
  {
    outlines->InsertNextCell(5);
    const vtkIdType first = points->GetNumberOfPoints();
    for (const auto& [along, across] :
         {std::pair{-0.5, -0.5}, {0.5, -0.5}, {0.5, 0.5}, {-0.5, 0.5}})
    {
      const Vector3 corner = bearing.area->centre + Vector3(along * bearing.area->length,
                                                            across * bearing.area->width, 0.0);
      outlines->InsertCellPoint(points->InsertNextPoint(corner.data()));
    }
    outlines->InsertCellPoint(first);
  }
  vtkNew<vtkPolyData> data;
  data->SetPoints(points);
  data->SetVerts(vertices);
  data->SetLines(outlines);
  add_texts(*data->GetCellData(), "what", 2 * all.size(),
            [&](std::size_t c) { return all[c % all.size()].what; });
  write_vtk<vtkXMLPolyDataWriter>(file, data.Get());
}

std::string draw_json(const Model& model,
                      const std::vector<std::pair<ConfiguredCraft, Mesh>>& meshes)
{
  JsonWriter json;
  json.open_object();
  json.member("program", "carlin");
  json.member("version", CARLIN_VERSION);
  json.member("model_file", model.file.string());
  json.key("configurations");
  json.open_array();
  for (const auto& [craft, mesh] : meshes)
  {
    json.open_object();
    json.member("configuration", craft.name);
    json.member("parts", static_cast<std::int64_t>(mesh.parts.size()));
    json.member("cells", static_cast<std::int64_t>(mesh.cells.size()));
    json.member("runs", static_cast<std::int64_t>(mesh.runs.size()));
    json.close_object();
  }
  json.close_array();
  json.close_object();
  return json.text() + "\n";
}
} // namespace

void write_drawing(const fs::path& folder, const Model& model, const Lattice& lattice,
                   const std::vector<std::pair<ConfiguredCraft, Mesh>>& meshes)
{
  StagedFolder staged(folder);
  if (model.hull)
    write_planes(staged.path(), lattice.resolved_planes());
  FileNames names({"planes.vtp", "planes.csv", "draw.json"});
  for (const auto& [craft, mesh] : meshes)
  {
    const fs::path place = staged.path() / names.make(craft.name);
    make_folder(place);
    write_parts(place / "parts.vtu", mesh);
    if (!craft.tanks.empty() || !craft.equipment.empty())
      write_feet(place / "feet.vtp", craft);
    if (!craft.tanks.empty())
    {
      write_tanks(place / "tanks.vtp", craft.tanks);
      write_collars(place / "collars.vtp", craft.tanks);
    }
  }
  write_text(staged.path() / "draw.json", draw_json(model, meshes));
  staged.move_in();
}
} // namespace carlin
