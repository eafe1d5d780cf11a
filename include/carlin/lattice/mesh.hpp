#pragma once

#include "carlin/core/types.hpp"
#include "carlin/description/model.hpp"

#include <array>
#include <memory>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace carlin
{
/// What a part of the mesh is; carries the names by which stresses are traced.
struct MeshPart
{
  enum class Kind
  {
    plate,
    member
  };
  std::string name;
  std::string family; ///< as written in the model; equals name if it was one part
  Kind kind = Kind::plate;
  PlateKind plate_kind = PlateKind::plating;
  std::optional<Surface> surface; ///< lattice surface it lies on; empty for frame parts
  bool is_outer_shell = false;    ///< bottom, side, transom, stem face: wet side outward
  std::string material_use;       ///< name of its schedule (plate) or profile (member)
  bool is_primary = false;
  FileLocation where;
};

/// Flat or warped quadrilateral, or triangle (last point -1). Points are ordered so that the
/// right-hand normal points inward: from the moulded face to the inside of the boat. Bottom up,
/// side inboard, deck down, transom forward, stem face aft. On internal surfaces: heights down, as
/// the deck; buttocks inboard, on the centreline to starboard; stations forward, as the transom.
/// Frame plates: by the order of their corners. A starboard cell of the lattice begins at the
/// mirrored first point of its port twin and goes round the other way. The lattice makes
/// quadrilaterals only: the bow closes to a narrow stem face, not to triangles.
struct Cell
{
  std::array<Index, 4> points{-1, -1, -1, -1};
  Index part = -1;
  bool is_triangle() const { return points[3] < 0; }
};

/// Line of points along which a member runs, without a gap: a member cut in two has two runs.
/// Fore-and-aft runs go forward, upright ones up; transverse ones go to port, over the centreline
/// in one run, or outward on port and inward on starboard if they do not reach it. `toe` is upright
/// x forward (or up, or outward) on port and on the centreline, mirrored on starboard: outboard for
/// a stringer on the bottom, up for one on the side, inboard for one on the deck, aft for frames
/// and beams that stand inside. So (line, toe, upright) is right-handed on port, left-handed for
/// fore-and-aft and upright runs on starboard. A frame member's toe is upright x its direction.
struct Run
{
  Index part = -1;
  std::vector<Index> points;
  std::vector<Vector3>
      upright; ///< one a segment: unit vector in which the profile stands off the line
  std::vector<Vector3>
      toe; ///< one a segment: unit vector of the profile's local y; mirrored to starboard
  bool stands_on_plating =
      true; ///< foot starts at the plating's face; false: at the line (pillar, frame member)
  Vector3 offset_from = Vector3::Zero(),
          offset_to =
              Vector3::Zero(); ///< extra, node to centroid, when stands_on_plating is false [m]
};

/// Named transverse plane, to say where a point lies in words.
struct NamedPlane
{
  std::string name;
  double x_at_base = 0.0; ///< [m]
  double rake = 0.0;      ///< [rad]
};

/// Plain mesh of one configuration. Nothing to the right of `lattice` knows i, j, k.
/// Points are those of the whole lattice (the same in every configuration); a point that no cell
/// and no run uses carries no structure.
struct Mesh
{
  std::vector<Vector3> points; ///< [m]
  std::vector<MeshPart> parts;
  std::vector<Cell> cells;
  std::vector<Run> runs;
  std::vector<NamedPlane> stations; ///< in order from aft; empty without a hull
  std::vector<std::pair<std::string, Index>> named_points; ///< frame points
  std::vector<Joint> joints;
  double mesh_size = 0.0; ///< asked [m]

  Index part_index(const std::string& name) const; ///< -1 if there is none
  /// "x 4.35 m, y -0.42 m, z 0.31 m, between frame-5 and frame-6"; without stations only
  /// coordinates.
  std::string place(const Vector3& position) const;
};

/// Quality of a mesh, printed by draw and check.
struct MeshQuality
{
  Index cells = 0, points_used = 0;
  double largest_aspect = 0.0; ///< longest over shortest side [-]
  std::string largest_aspect_place;
  double largest_skew = 0.0; ///< departure of a corner from 90 degrees [rad]
  std::string largest_skew_place;
  double largest_warp = 0.0; ///< distance of a corner from the mean plane over mean side [-]
  std::string largest_warp_place;
  double mean_side = 0.0; ///< [m]
  /// Across the short side of a panel: cells of one plate part up to its edge, a member or another
  /// part.
  int fewest_cells_per_panel = 0;
  std::string fewest_cells_per_panel_place;
  /// Of a member between its ends, plates that it crosses (not those of the surface it lies on) and
  /// primary members that it crosses.
  int fewest_cells_per_span = 0;
  std::string fewest_cells_per_span_place;
};
MeshQuality mesh_quality(const Mesh& mesh);

/// The lattice of a model: geometry, no physics. One a model, from the planes of all
/// configurations.
///
/// Hull lines: the points of one name at all offset stations, faired over their own x. A station
/// plane cuts them; straight lines join the cuts to the section. Bottom points of a column lie on
/// the section's bottom, deck points on the deck (one round of beam for the whole length: rise at
/// the centreline deck_camber x (breadth / largest breadth)^2), columns are straight between, the
/// side column follows the side. Between named stations position and tan(rake) change linearly. A
/// buttock beyond its straight range keeps its fraction of the chine's half breadth at the bottom
/// and of the deck edge's at the deck; a height keeps its fraction of the interval between the
/// nearest heights that are still level (bottom and deck are), measured where it was last level
/// itself. Intervals between named planes are divided equally along the whole boat: stations by the
/// longest hull line, columns by the mean breadth over the length (bottom or deck, whichever is
/// wider), heights by the mean over the length on the column where they are highest; no mean is
/// longer than the mesh size.
class Lattice
{
public:
  /// @param mesh_size Asked cell side [m].
  /// @throws ModelError for planes nearer than a quarter of the mesh size (names both), a folded
  /// cell
  ///   (names station and buttock), a plane outside the hull, offsets that cannot be lofted.
  Lattice(const Model& model, double mesh_size);

  /// Cells and runs of one configuration (hull lattice and frame alike). A part of which the
  /// configuration leaves nothing is not in the mesh. Frame points that coincide with one another
  /// or with a point of the lattice (within 1e-9 of the structure's size) are one point.
  ///
  /// A member's `inside` or `outside` is the mean normal of the two faces of its surface beside the
  /// edge; the other directions (up, forward, inboard ...) are those of the boat made square to the
  /// edge: a bottom stringer that stands `up` has an upright web.
  /// @throws ModelError with all problems: ranges that hold no face or edge, names that do not
  ///   exist, two plates on one face, cut-outs that take nothing away from any part, members with
  ///   no direction to stand in.
  Mesh mesh(const ConfiguredCraft& craft) const;

  /// Points of the lattice by named planes, for `draw`: resolved positions. Stations and heights
  /// are closed outlines of both halves, buttocks of the port half; built-in planes are included.
  struct ResolvedPlane
  {
    std::string kind, name;
    std::vector<Vector3> line; ///< representative polyline [m]
  };
  std::vector<ResolvedPlane> resolved_planes() const;

private:
  struct Impl;
  std::shared_ptr<const Impl> impl_;
};
} // namespace carlin
