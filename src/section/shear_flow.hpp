#pragma once

#include "carlin/core/types.hpp"

#include <vector>

namespace carlin
{
/// One straight wall of an open thin-walled section, by its mid-line from a free end to the
/// junction where all walls meet.
struct OpenWall
{
  Vector2 free_end = Vector2::Zero(); ///< (y, z) [m]
  Vector2 junction = Vector2::Zero(); ///< [m]
  double thickness = 0.0;             ///< [m]
};

/// What shear forces do to an open section, mid-line theory.
struct ShearFlowResult
{
  double shear_area_y = 0.0;              ///< [m^2]
  double shear_area_z = 0.0;              ///< [m^2]
  Vector2 shear_centre = Vector2::Zero(); ///< from the origin of the wall coordinates (y, z) [m]
};

/// Shear areas from the energy of the shear flow, 1/A_s = integral of q^2 / (V^2 t) ds, and the
/// shear centre from its moment; the product moment is kept.
///
/// Source: Timoshenko & Gere, Mechanics of Materials, 2nd ed. (1984), ch. 6 (flow and shear centre;
/// from memory); values against H3, H8 of the verification book.
ShearFlowResult open_section_shear_flow(const std::vector<OpenWall>& walls);
} // namespace carlin
