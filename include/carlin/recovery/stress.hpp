#pragma once

#include "carlin/recovery/panels.hpp"
#include "carlin/recovery/stage.hpp"

#include <span>
#include <vector>

namespace carlin
{
/// Fills `shell_stresses` of many stages of one structure at once: the strain matrices, which cost
/// most, are made once a shell. Stages left out are worked out one by one wherever they are read.
/// N/t and 6 M/t^2, M moved from the reference surface to the mid-thickness.
void recover_shell_stresses(const Structure& structure, std::span<StageSolution* const> stages);

/// Plate stress of one shell: von Mises at both faces and the middle.
struct PlateStress
{
  double mid = 0.0, inner = 0.0, outer = 0.0; ///< at the element centre [Pa]
  double peak = 0.0; ///< largest corner value, both faces [Pa]; Gauss points of triangles
};
std::vector<PlateStress> plate_stresses(const Structure& structure, const StageSolution& stage);

/// Governing stress of one panel.
struct PanelStress
{
  Index panel = -1;
  double nominal = 0.0;       ///< von Mises of either face: membrane and bending as below [Pa]
  double peak = 0.0;          ///< as found at corners, moves with the mesh [Pa]
  double membrane = 0.0;      ///< von Mises of the middle, mean over the stated length [Pa]
  double bending_found = 0.0; ///< largest principal: at panel edges by extrapolation within the
                              ///< part, inside at shell centres [Pa]
  double bending_closed_form =
      0.0;                     ///< clamped panel under its own pressure [Pa]; 0 without pressure
  bool is_mesh_coarse = false; ///< fewer than 8 cells across: the closed form stands in
  Vector3 mean_membrane = Vector3::Zero(); ///< mean over the panel: along the long side, along the
                                           ///< short side, shear; tension + [Pa]
  Vector3 place = Vector3::Zero();
};

/// Length over which nominal plate stress is a mean: 100 mm, or the panel's short side where that
/// is less. Design, section 9; common practice, no source.
inline constexpr double nominal_stress_length = 0.1; // [m]

/// Nominal stress of panels: membrane and bending as means over the stated length within the panel
/// (a larger cell stands for itself). On a coarse panel under pressure the clamped closed form,
/// with its Poisson part along the edge, is put on the membrane found where it asks for more. The
/// panel's pressure is the mean over its area of what acts on its shells.
std::vector<PanelStress> panel_stresses(const Structure& structure,
                                        const std::vector<Panel>& panels,
                                        const StageSolution& stage);

/// Largest bending stress at the middle of the long edge of a clamped rectangular plate under
/// uniform pressure: 6 beta p (b/t)^2, b the short side.
/// @param pressure [Pa], either sign: the magnitude is used; sides and thickness [m], > 0.
/// Source: Timoshenko & Woinowsky-Krieger, Theory of Plates and Shells (1959), table 35, edge
/// moments recomputed for the verification book (B3); long plates 1/12, exact.
double clamped_panel_stress(double pressure, double short_side, double long_side, double thickness);

/// Stress of one member element: largest by magnitude over ends and outline points, signed.
struct MemberStress
{
  double nominal = 0.0; ///< axial plus bending by the member formula [Pa]
  double shear = 0.0;   ///< V over shear area (over area where rigid in shear), mean [Pa]
  Vector3 place = Vector3::Zero(); ///< of the end, at the centroid [m]
};
std::vector<MemberStress> member_stresses(const Structure& structure, const StageSolution& stage);

/// Load of a joint spring, as the fastened part feels it move: stiffness times (part less other).
struct JointLoad
{
  Index joint = -1;
  Index spring = -1;
  double along = 0.0, across = 0.0, normal = 0.0; ///< [N/m]
  double rotation = 0.0;                          ///< [N m/m]
  double slip = 0.0;                              ///< along [m]
};
std::vector<JointLoad> joint_loads(const Structure& structure, const StageSolution& stage);
} // namespace carlin
