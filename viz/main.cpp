#include "picture.hpp"

#include <CLI/CLI.hpp>
#include <iostream>
#include <map>
#include <vtkObject.h>

/// carlin-picture RESULTS --case NAME --stage NAME --into FILE.png
int main(int argc, char** argv)
{
  using namespace carlin::viz;
  CLI::App app{"Picture of the displaced hull before and after, coloured by stress.\n"
               "Example: carlin-picture results --case landing --stage landing --into hull.png"};
  std::string results, file;
  SceneOptions scene;
  PictureOptions picture;
  double scale = 0.0;
  app.add_option("RESULTS", results, "folder written by carlin check --into")->required();
  app.add_option("--case", scene.load_case, "load case")->required();
  app.add_option("--stage", scene.stage, "stage of the case")->required();
  app.add_option("--into", file, "picture to write (PNG)")->required();
  app.add_option("--before", scene.before, "configuration shown first; the base if not given");
  app.add_option("--after", scene.after, "configuration shown second; the last if not given");
  const CLI::Option* has_scale =
      app.add_option("--scale", scale, "how many times displacements are drawn")
          ->check(CLI::NonNegativeNumber);
  app.add_option("--seen-from", picture.seen_from, "above or below")
      ->transform(CLI::CheckedTransformer(
          std::map<std::string, SeenFrom>{{"above", SeenFrom::above}, {"below", SeenFrom::below}}));
  app.add_option("--width", picture.width, "pixels")->check(CLI::Range(200, 8000));
  app.add_option("--height", picture.height, "pixels")->check(CLI::Range(200, 8000));
  try
  {
    app.parse(argc, argv);
  }
  catch (const CLI::ParseError& error)
  {
    return app.exit(error) == 0 ? 0 : 2;
  }
  if (has_scale->count() > 0)
    scene.warp_scale = scale;
  vtkObject::GlobalWarningDisplayOff(); // errors are read and said in our own words
  try
  {
    write_picture(file, make_scene(results, scene), picture);
  }
  catch (const ViewError& error)
  {
    std::cerr << "carlin-picture: " << error.what() << '\n';
    return 3;
  }
  std::cout << file << '\n';
  return 0;
}
