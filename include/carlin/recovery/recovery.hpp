#pragma once

#include "carlin/loads/loads.hpp"
#include "carlin/mounts/mounts.hpp"
#include "carlin/solution/hull_solver.hpp"
#include "carlin/structure/structure.hpp"

#include <map>
#include <string>
#include <vector>

namespace carlin
{
/// A panel: shells of one plate part bounded by members, other plates or free edges.
struct Panel
{
  Index part = -1;
  std::vector<Index> shells;
  Vector3 centre = Vector3::Zero();
  double short_side = 0.0, long_side = 0.0; ///< of the panel's mean rectangle [m]
  int cells_across = 0;                     ///< over the short side
  std::vector<Index> boundary_nodes, inner_nodes;
};
std::vector<Panel> find_panels(const Structure& structure);

/// Result of one stage of one case on one configuration.
struct StageSolution
{
  std::string name;
  VectorX displacement; ///< 6 n, as solved (pins at rest)
  VectorX applied;      ///< 6 n: everything that acts on the hull: water, inertia, collars
  std::vector<double> temperature_rise;                  ///< by mesh part [K]
  std::vector<std::pair<Index, double>> shell_pressures; ///< [Pa], along the inward normal
  std::vector<Vector12> member_fixed_end; ///< one a member: its equivalent loads (empty: none)
  RigidAcceleration acceleration;
  Vector6 pin_reaction = Vector6::Zero();   ///< resultant about the origin; audit
  double largest_load = 0.0;                ///< norm the audit compares with [N]
  MountStageResult mounts_low, mounts_high; ///< slides and grips at the low and the high end
  std::vector<LoadNote> notes;
};

/// Shape shown: mean rigid motion removed, weighted by shell area of the nodes (area of the base
/// hull).
VectorX shape_shown(const Structure& structure, const VectorX& displacement);

/// Plate stress of one shell: at both faces and the middle, nominal by panel and as found.
struct PlateStress
{
  double mid = 0.0, inner = 0.0, outer = 0.0; ///< von Mises at the element centre [Pa]
  double peak = 0.0;                          ///< largest corner value, both faces [Pa]
};
std::vector<PlateStress> plate_stresses(const Structure& structure, const StageSolution& stage);

/// Governing stress of one panel.
struct PanelStress
{
  Index panel = -1;
  double nominal = 0.0;       ///< von Mises: mean over the stated length, bending as below [Pa]
  double peak = 0.0;          ///< as found at corners, moves with the mesh [Pa]
  double membrane = 0.0;      ///< von Mises of the middle, mean over the stated length [Pa]
  double bending_found = 0.0; ///< at panel edges by extrapolation within the part [Pa]
  double bending_closed_form =
      0.0;                     ///< clamped panel under its own pressure [Pa]; 0 without pressure
  bool is_mesh_coarse = false; ///< fewer than 8 cells across: the closed form stands in
  Vector3 place = Vector3::Zero();
};
std::vector<PanelStress> panel_stresses(const Structure& structure,
                                        const std::vector<Panel>& panels,
                                        const StageSolution& stage);

/// Largest bending stress at the middle of the long edge of a clamped rectangular plate under
/// uniform pressure: beta p (b/t)^2. Source: Timoshenko & Woinowsky-Krieger 1959, table 35,
/// recomputed (B3).
double clamped_panel_stress(double pressure, double short_side, double long_side, double thickness);

/// Stress of one member element: largest by magnitude over ends and outline points, signed.
struct MemberStress
{
  double nominal = 0.0; ///< axial plus bending by the member formula [Pa]
  double shear = 0.0;   ///< V over shear area, mean [Pa]
  Vector3 place = Vector3::Zero();
};
std::vector<MemberStress> member_stresses(const Structure& structure, const StageSolution& stage);

/// Load of a joint spring.
struct JointLoad
{
  Index joint = -1;
  Index spring = -1;
  double along = 0.0, across = 0.0, normal = 0.0; ///< [N/m]
  double rotation = 0.0;                          ///< [N m/m]
  double slip = 0.0;                              ///< along [m]
};
std::vector<JointLoad> joint_loads(const Structure& structure, const StageSolution& stage);

/// Deflection of the girder between two stations from their chord, at keel nodes: largest, signed,
/// down -.
struct GirderDeflection
{
  double deflection = 0.0; ///< [m]
  double chord = 0.0;      ///< [m]
  double x = 0.0;          ///< [m]
};
GirderDeflection girder_deflection(const Structure& structure, const VectorX& displacement,
                                   double x_from, double x_to);

/// Deflection of a panel: its middle from the mean plane of its boundary, along its normal.
double panel_deflection(const Structure& structure, const Panel& panel,
                        const VectorX& displacement);

/// Deflection of a member from the chord of its supports (crossing plates), per span.
struct MemberDeflection
{
  Index run = -1;
  double deflection = 0.0, span = 0.0; ///< [m]
  Vector3 place = Vector3::Zero();
};
std::vector<MemberDeflection> member_deflections(const Structure& structure,
                                                 const VectorX& displacement);

/// End section of a bay: shell nodes at a station with weights for couples and readings.
struct EndSection
{
  std::string name;
  double x = 0.0;
  std::vector<Index> nodes;
  std::vector<double> weights;      ///< axial stiffness of the base there [N/m x m]
  std::vector<double> area_weights; ///< in-plane area, for twist
};
/// Sections at the named stations from the base configuration's mesh (same points in all).
std::vector<EndSection> end_sections(const Structure& base,
                                     const std::vector<std::string>& stations);

/// Stiffness of one bay of a configuration. Definitions: design, section 6.
struct BayStiffness
{
  std::string from, to;
  double length = 0.0;
  double bending = 0.0; ///< EI = M L / turn [N m^2]
  double torsion =
      0.0; ///< GJ = T L / twist [N m^2]: a measure of this hull, not a section property
  double torsion_per_angle = 0.0;   ///< T / twist [N m/rad]
  bool near_loaded_section = false; ///< within one depth of it: labelled, not judged
};
struct GirderStiffness
{
  std::vector<BayStiffness> bays;
  BayStiffness whole; ///< between the loaded sections, less nothing
  double shear = 0.0; ///< whole: shear stiffness GA from a unit-shear case [N]; 0: not found
};
/// Unit couples on the first and last section as linear traction; least-squares rotations read at
/// all.
GirderStiffness girder_stiffness(const Structure& structure, const HullSolver& solver,
                                 const std::vector<EndSection>& sections);
} // namespace carlin
