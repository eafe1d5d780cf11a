#include "picture.hpp"

#include <X11/Xlib.h>
#include <fmt/format.h>
#include <memory>
#include <vtkActor.h>
#include <vtkCamera.h>
#include <vtkDataSetMapper.h>
#include <vtkErrorCode.h>
#include <vtkLookupTable.h>
#include <vtkNew.h>
#include <vtkPNGWriter.h>
#include <vtkPolyDataMapper.h>
#include <vtkProperty.h>
#include <vtkRenderWindow.h>
#include <vtkRenderer.h>
#include <vtkScalarBarActor.h>
#include <vtkTextActor.h>
#include <vtkTextProperty.h>
#include <vtkWindowToImageFilter.h>

namespace carlin::viz
{
namespace
{
constexpr double strip = 0.16; // of the height, for caption and colour bar

using OpenDisplay = std::unique_ptr<Display, int (*)(Display*)>;

/// Stays open while the picture is made: a server whose last client leaves starts anew, and a
/// window asked for just then ends the process.
OpenDisplay require_display()
{
  OpenDisplay display(XOpenDisplay(nullptr), &XCloseDisplay);
  if (!display)
    throw ViewError("no display can be opened, and pictures need one; run viz/make-picture.sh, "
                    "which starts a virtual one");
  return display;
}

vtkSmartPointer<vtkLookupTable> colour_table(const std::array<double, 2>& range)
{
  constexpr int steps = 256;
  auto table = vtkSmartPointer<vtkLookupTable>::New();
  table->SetNumberOfTableValues(steps);
  table->SetTableRange(range[0], range[1] > range[0] ? range[1] : range[0] + 1.0);
  for (int i = 0; i < steps; ++i)
  {
    const std::array<double, 3> colour = colour_at(static_cast<double>(i) / (steps - 1));
    table->SetTableValue(i, colour[0], colour[1], colour[2], 1.0);
  }
  return table;
}

vtkSmartPointer<vtkTextActor> label(const std::string& text, int size, double x, double y)
{
  auto actor = vtkSmartPointer<vtkTextActor>::New();
  actor->SetInput(text.c_str());
  actor->GetTextProperty()->SetColor(0.1, 0.1, 0.1);
  actor->GetTextProperty()->SetFontSize(size);
  actor->GetPositionCoordinate()->SetCoordinateSystemToNormalizedViewport();
  actor->SetPosition(x, y);
  return actor;
}

void add_hull(vtkRenderer& renderer, const Hull& hull, const Scene& scene, vtkLookupTable& table,
              int text_size)
{
  vtkNew<vtkDataSetMapper> mapper;
  mapper->SetInputData(hull.grid);
  mapper->SetScalarModeToUseCellFieldData();
  mapper->SelectColorArray(scene.coloured_by.c_str());
  mapper->SetLookupTable(&table);
  mapper->UseLookupTableScalarRangeOn();
  vtkNew<vtkActor> actor;
  actor->SetMapper(mapper);
  actor->GetProperty()->SetLineWidth(2.0F);
  actor->GetProperty()->SetInterpolationToFlat();
  actor->GetProperty()->SetAmbient(0.5); // light enough that shade is not taken for stress
  actor->GetProperty()->SetDiffuse(0.5);
  renderer.AddActor(actor);
  if (hull.tanks)
  {
    vtkNew<vtkPolyDataMapper> tank_mapper;
    tank_mapper->SetInputData(hull.tanks);
    tank_mapper->ScalarVisibilityOff();
    vtkNew<vtkActor> tanks;
    tanks->SetMapper(tank_mapper);
    tanks->GetProperty()->SetColor(0.85, 0.88, 0.90);
    renderer.AddActor(tanks);
  }
  renderer.AddActor2D(label(fmt::format("{}: largest displacement {:.1f} mm", hull.title,
                                        1e3 * hull.largest_displacement),
                            text_size, 0.02, 0.90));
}

/// Looks along the hull's diagonal from the port bow, slightly from above or below.
void aim(vtkRenderer& renderer, const std::array<double, 6>& bounds, SeenFrom seen_from)
{
  vtkCamera& camera = *renderer.GetActiveCamera();
  camera.SetParallelProjection(1);
  camera.SetFocalPoint(0.0, 0.0, 0.0);
  camera.SetPosition(0.35, 1.0, seen_from == SeenFrom::above ? 0.65 : -0.65);
  camera.SetViewUp(0.0, 0.0, 1.0);
  renderer.ResetCamera(bounds.data());
  camera.Zoom(1.8); // ResetCamera fits a sphere round a long thin boat
  renderer.ResetCameraClippingRange();
}

std::array<double, 6> common_bounds(const Scene& scene)
{
  std::array<double, 6> bounds{};
  scene.hulls.front().grid->GetBounds(bounds.data());
  for (const Hull& hull : scene.hulls)
  {
    std::array<double, 6> other{};
    hull.grid->GetBounds(other.data());
    for (std::size_t axis = 0; axis < 3; ++axis)
    {
      bounds[2 * axis] = std::min(bounds[2 * axis], other[2 * axis]);
      bounds[2 * axis + 1] = std::max(bounds[2 * axis + 1], other[2 * axis + 1]);
    }
  }
  return bounds;
}

void add_legend(vtkRenderer& renderer, const Scene& scene, vtkLookupTable& table, int text_size)
{
  vtkNew<vtkScalarBarActor> bar;
  bar->SetLookupTable(&table);
  bar->SetTitle(scene.coloured_by.c_str());
  bar->SetOrientationToHorizontal();
  bar->SetNumberOfLabels(5);
  bar->SetLabelFormat("%.0f");
  bar->UnconstrainedFontSizeOn();
  for (vtkTextProperty* text : {bar->GetTitleTextProperty(), bar->GetLabelTextProperty()})
  {
    text->SetColor(0.1, 0.1, 0.1);
    text->SetFontSize(text_size);
    text->ItalicOff();
    text->BoldOff();
    text->ShadowOff();
  }
  bar->SetPosition(0.2, 0.05);
  bar->SetWidth(0.6);
  bar->SetHeight(0.6);
  renderer.AddActor2D(bar);
  renderer.AddActor2D(label(scene.caption, text_size, 0.02, 0.78));
}
} // namespace

void write_picture(const std::filesystem::path& file, const Scene& scene,
                   const PictureOptions& options)
{
  const OpenDisplay display = require_display();
  vtkNew<vtkRenderWindow> window;
  window->SetOffScreenRendering(1);
  window->SetSize(options.width, options.height);
  const vtkSmartPointer<vtkLookupTable> table = colour_table(scene.colour_range);
  const int text_size = std::max(10, options.height / 55);
  const std::array<double, 6> bounds = common_bounds(scene);
  const double share = (1.0 - strip) / static_cast<double>(scene.hulls.size());
  for (std::size_t h = 0; h < scene.hulls.size(); ++h)
  {
    vtkNew<vtkRenderer> renderer;
    const double top = 1.0 - static_cast<double>(h) * share;
    renderer->SetViewport(0.0, top - share, 1.0, top);
    renderer->SetBackground(1.0, 1.0, 1.0);
    add_hull(*renderer, scene.hulls[h], scene, *table, text_size);
    aim(*renderer, bounds, options.seen_from);
    window->AddRenderer(renderer);
  }
  vtkNew<vtkRenderer> legend;
  legend->SetViewport(0.0, 0.0, 1.0, strip);
  legend->SetBackground(1.0, 1.0, 1.0);
  add_legend(*legend, scene, *table, text_size);
  window->AddRenderer(legend);
  window->Render();

  vtkNew<vtkWindowToImageFilter> image;
  image->SetInput(window);
  image->ReadFrontBufferOff();
  vtkNew<vtkPNGWriter> writer;
  writer->SetFileName(file.c_str());
  writer->SetInputConnection(image->GetOutputPort());
  writer->Write();
  if (writer->GetErrorCode() != vtkErrorCode::NoError || !std::filesystem::exists(file))
    throw ViewError(file.string() + ": cannot be written (" +
                    vtkErrorCode::GetStringFromErrorCode(writer->GetErrorCode()) + ")");
}
} // namespace carlin::viz
