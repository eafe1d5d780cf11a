#pragma once

#include "shell_geometry.hpp"

namespace carlin
{
using Matrix38 = Eigen::Matrix<double, 3, 8>;
using Matrix48 = Eigen::Matrix<double, 4, 8>;
using Matrix212 = Eigen::Matrix<double, 2, 12>;
using Matrix34 = Eigen::Matrix<double, 3, 4>;
using Row8 = Eigen::Matrix<double, 1, 8>;

/// Strains at one place from the motion of the corners in local axes. Columns of the membrane:
/// (u, v) of corners 1 to 4; of the curvature: (r_x, r_y); of the shear: (w, r_x, r_y).
struct ShellStrain
{
  Matrix38 membrane;
  Matrix38 curvature;
  Matrix212 shear;
  Matrix34 incompatible; ///< of the four amplitudes that are condensed out; zero in a triangle
  Row8 spin;             ///< in-plane rotation (v,x - u,y) / 2
  double jacobian = 0.0;
  Eigen::Matrix<double, 1, 4> shape;
};

/// Shear along the sides by (w, r_x, r_y): row i is the strain of side i (corner i to i + 1) times
/// its length, constant along the side. Tying strains of both quad and triangle.
using SideShear = Eigen::Matrix<double, 4, 12>;
SideShear side_shear(const ShellPlane& plane);

/// Strain at natural coordinates. @param centre Shape functions of the quad's centre, at which
/// the slopes of the incompatible modes are taken, so that they do no work on a constant stress
/// (Taylor, Beresford & Wilson 1976).
ShellStrain shell_strain(const ShellPlane& plane, const ShellShape& centre, const SideShear& sides,
                         double xi, double eta);

/// Transverse shear stiffness that the element uses [N/m]. A quad's is the section's. The
/// three-node triangle locks when thin (clamped plate, t / a = 1e-4, 32 x 32: 5 % of the true
/// deflection), so its is lowered by t^2 / (t^2 + 0.1 h^2), h the longest side; the difference
/// vanishes with h^2.
/// Source: Lyly, Stenberg & Vihinen, A stable bilinear element for the Reissner-Mindlin plate
/// model, Comput. Methods Appl. Mech. Eng. 110 (1993) 343-357 (from memory), applied to the
/// triangle.
Matrix2 element_shear(const ShellPlane& plane, const ShellSection& section);

/// Energy of the incompatible modes: their own and with the membrane and bending freedoms.
struct ShellModes
{
  Matrix48 membrane; ///< amplitudes from (u, v): -K_aa^-1 K_am
  Matrix48 bending;  ///< amplitudes from (r_x, r_y)
};

/// Local stiffness by blocks, in the columns of ShellStrain; incompatible modes condensed out.
struct ShellBlocks
{
  Eigen::Matrix<double, 8, 8> membrane;
  Eigen::Matrix<double, 8, 8> coupling; ///< rows (u, v), columns (r_x, r_y)
  Eigen::Matrix<double, 8, 8> bending;
  Eigen::Matrix<double, 12, 12> shear;
  Eigen::Matrix<double, 8, 4> spin_drilling; ///< rows (u, v), columns r_z
  Eigen::Matrix<double, 4, 4> drilling;      ///< r_z
  ShellModes modes;
};
ShellBlocks shell_blocks(const ShellPlane& plane, const ShellSection& section);
} // namespace carlin
