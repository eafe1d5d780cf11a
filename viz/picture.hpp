#pragma once

#include "scene.hpp"

namespace carlin::viz
{
enum class SeenFrom
{
  above,
  below
};

struct PictureOptions
{
  int width = 1600, height = 1200; ///< pixels
  SeenFrom seen_from = SeenFrom::above;
};

/// Draws the hulls one below the other, the same camera and colours for both, and writes a PNG.
/// @throws ViewError when no display can be opened (asked before a window is made, which would end
///   the process), or the file cannot be written.
void write_picture(const std::filesystem::path& file, const Scene& scene,
                   const PictureOptions& options);
} // namespace carlin::viz
