#pragma once

#include "carlin/core/types.hpp"
#include "carlin/description/materials.hpp"

#include <array>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace carlin
{
/// Which family of lattice faces a patch lies on.
enum class Surface
{
  bottom, ///< hull bottom, keel to chine
  side,   ///< hull side, chine to deck edge
  deck,
  buttock, ///< the fore-and-aft plane `plane`: girder webs, longitudinal bulkheads, casings
  height,  ///< the level `plane`: flats, soles
  station  ///< the transverse plane `plane`: bulkheads, floors, deep frames, transom, stem face
};

enum class Sides
{
  both,
  port,
  starboard
};

/// From one named plane to another; an empty name means the first or last there is.
struct PlaneRange
{
  std::string from, to;
};

/// A rectangle of lattice faces. The range along the surface's own plane is not used.
struct Patch
{
  Surface surface = Surface::bottom;
  std::string plane; ///< for buttock, height, station
  PlaneRange stations;
  PlaneRange buttocks; ///< from the centreline outward, on each of `sides`
  PlaneRange heights;
  Sides sides = Sides::both;
};

/// A rectangle taken out of a part: an opening, or what a configuration cuts. Ranges as in Patch; a
/// plate part keeps its own surface.
struct CutOut
{
  FileLocation where;
  PlaneRange stations, buttocks, heights;
  Sides sides = Sides::both;
};

enum class PlateKind
{
  plating,
  bulkhead,
  web,
  flat,
  hatch
};

/// A piece of plating: hull, deck, bulkhead, girder web, flat, hatch.
struct PlatePart : Named
{
  PlateKind kind = PlateKind::plating;
  Patch patch;
  std::string schedule;
  std::vector<CutOut> cut_outs;
  std::string family; ///< name as written, when a list of planes made several parts of one entry;
                      ///< also of a region that a configuration has replaced
};

/// Direction in which a member's profile stands off the line of nodes. `inside` is off the inner
/// face of the hull or deck; on internal surfaces the side must be said.
enum class Stands
{
  inside,
  outside,
  up,
  down,
  forward,
  aft,
  inboard,
  outboard
};

/// A stringer, girder flange, frame, beam, carling, pillar: a run of lattice edges. Of the three
/// ranges exactly one is used, that along which it runs; the other two coordinates are fixed by
/// the surface it lies on and by `plane`.
struct MemberPart : Named
{
  std::string family; ///< name as written, when a list of planes made several parts of one entry
  Surface surface = Surface::bottom;
  std::string surface_plane; ///< for surfaces buttock, height, station
  std::string
      plane; ///< second fixed plane; e.g. on the bottom: a buttock (stringer) or a station (frame)
  Surface plane_kind = Surface::buttock; ///< of `plane`: buttock, height or station (bottom, deck
                                         ///< and side act as j=0, j=J, i=I)
  PlaneRange along;                      ///< named planes of the third kind
  Sides sides = Sides::both;
  std::string profile;
  Stands stands = Stands::inside;
  bool is_primary = false; ///< primary member (girder, web frame): its own deflection limit
  std::vector<CutOut> cut_outs;
};

/// A line where one part meets others and is fastened, not welded through: its nodes are split and
/// carry stiffness per metre.
struct Joint : Named
{
  std::string part;                ///< the part fastened: all its edges where it meets other parts
  double stiffness_along = 0.0;    ///< slip along the line [N/m per m]
  double stiffness_across = 0.0;   ///< in the plane of the part, across the line [N/m per m]
  double stiffness_normal = 0.0;   ///< out of the plane of the part [N/m per m]
  double stiffness_rotation = 0.0; ///< about the line [N m/rad per m]
  std::string source;
};

/// Rectangle on the structure over which something bears: nodes of `parts` within it.
struct FootprintArea
{
  Vector3 centre = Vector3::Zero(); ///< [m]
  double length = 0.0;              ///< along x [m]; 0: the nearest nodes only
  double width = 0.0;               ///< along y (along z on upright parts) [m]
  std::vector<std::string> parts;   ///< parts it sits on; empty: any
};

/// An engine, a battery box: a rigid mass spread by footprint; stiffens nothing.
struct Equipment : Named
{
  double mass = 0.0;                     ///< [kg]
  Vector3 centre = Vector3::Zero();      ///< centre of gravity [m]
  std::vector<FootprintArea> footprints; ///< at least one
};

/// A structure without a hull, or beside one: points, straight members between them, flat plates.
struct FramePoint : Named
{
  Vector3 position = Vector3::Zero(); ///< [m]
};

struct FrameMember : Named
{
  std::string from, to; ///< points
  Index divisions = 1;
  std::string profile;
  Vector3 upright =
      Vector3::UnitZ(); ///< direction of the profile's height, made square to the line
  Vector3 offset_from = Vector3::Zero(),
          offset_to = Vector3::Zero(); ///< node to centroid, global [m]
};

struct FramePlate : Named
{
  std::vector<std::string>
      corners; ///< four points, in order round; divisions[0] along 1-2, [1] along 2-3
  std::vector<Index> divisions = {1, 1};
  std::string schedule;
};

/// Which freedoms a support holds, and what motion it imposes (zero if not said).
struct Support : Named
{
  std::vector<std::string> points; ///< points held
  std::vector<std::pair<std::string, std::string>>
      edges;                                      ///< or all nodes on the line between two points
  std::array<bool, 6> holds{};                    ///< u_x u_y u_z r_x r_y r_z, global axes
  Vector6 motion = Vector6::Zero();               ///< imposed, [m] and [rad]; used where held
  std::array<std::optional<double>, 6> springs{}; ///< instead of held: stiffness [N/m, N m/rad]
};

/// A point mass on a frame point.
struct PointMass : Named
{
  std::string point;
  double mass = 0.0; ///< [kg]
};

/// Structure described by points instead of a lattice.
struct Frame
{
  std::vector<FramePoint> points;
  std::vector<FrameMember> members;
  std::vector<FramePlate> plates;
  std::vector<Support> supports;
  std::vector<PointMass> masses;
};
} // namespace carlin
