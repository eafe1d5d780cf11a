#pragma once

#include "carlin/core/types.hpp"
#include "carlin/description/materials.hpp"

#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace carlin
{
/// One point of a hull section, port side. The first point of a section is on the centreline (the
/// keel), the last is the deck edge.
struct OffsetPoint
{
  std::string
      name; ///< same names in the same order at every station: keel, ..., chine, ..., deck-edge
  Vector3 position = Vector3::Zero(); ///< [m]
};

/// Points of one section in order from the keel to the deck edge. Points of one section may have
/// different x: a raked station.
struct OffsetStation : Named
{
  std::vector<OffsetPoint> points;
};

enum class Fairing
{
  smooth,  ///< shape-preserving cubic along x between stations (Fritsch & Carlson 1980)
  straight ///< straight lines between stations
};

/// Hull by offsets.
struct HullOffsets
{
  FileLocation where;
  std::vector<OffsetStation> stations; ///< at least two, x increasing
  std::string chine = "chine";         ///< name of the point where bottom and side meet
  Fairing fairing = Fairing::smooth;
};

/// Hull from a few dimensions, for a first look: hard chine, raked straight stem ending in a narrow
/// face, transom upright. Converted to offsets by the lattice.
struct HullDimensions
{
  FileLocation where;
  double length = 0.0;     ///< [m]
  double beam = 0.0;       ///< at the deck edge [m]
  double chine_beam = 0.0; ///< [m]
  double depth = 0.0;      ///< keel to deck edge amidships [m]
  double deadrise = 0.0;   ///< amidships [rad]; 0: flat bottom
  double parallel_body =
      0.55; ///< part of the length, from the transom, with constant section [-]; 1: prismatic box
  double stem_face = 0.08; ///< breadth of the stem face [m]
  double stem_rake = 0.0;  ///< from upright, positive leaning forward [rad]
};

/// Transverse plane of the lattice: x = position + (z - 0) tan(rake).
struct Station : Named
{
  double position = 0.0; ///< x at z = 0 [m]
  double rake = 0.0;     ///< [rad], positive: top leans forward
};

/// Fore-and-aft plane of the lattice, off the centreline, both sides alike. Built in and not to be
/// declared: `centreline` (y = 0) and `chine` (the side of the hull).
/// Straight along `plan` between stations `from` and `to`; beyond them kept at its fraction of the
/// half breadth of the chine (at the deck: of the deck edge) there, so that it stays in the boat
/// where the bow narrows.
struct Buttock : Named
{
  std::vector<std::pair<double, double>>
      plan;                          ///< (x, y) [m], y > 0; one entry: constant y, x unused
  std::string follows;               ///< instead: name of a bottom knuckle of the offsets
  std::optional<double> deck_offset; ///< y at the deck where the plane leans [m]; absent: upright
  std::string from, to;              ///< names of stations; empty: first, last
};

/// Named height above base. Built in: `bottom` (the bottom plating) and `deck`.
/// Level at `profile` from the centreline out to buttock `out_to` and between stations `from` and
/// `to`; beyond, kept at its fraction of the height between its nearest level neighbours (bottom
/// and deck, or heights that are still level there).
struct Height : Named
{
  std::vector<std::pair<double, double>> profile; ///< (x, z) [m]; one entry: constant z, x unused
  std::string follows;  ///< instead: name of a side knuckle of the offsets
  std::string out_to;   ///< buttock; empty: `chine`, out to the side
  std::string from, to; ///< names of stations; empty: first, last
};

struct Hull
{
  std::optional<HullOffsets> offsets; ///< exactly one of the two is given
  std::optional<HullDimensions> dimensions;
  double deck_camber = 0.0;      ///< rise of the deck at the centreline over its edge where the
                                 ///< deck is widest; one round of beam for all of it [m]
  std::vector<Station> stations; ///< at least two; first and last close the hull
  std::vector<Buttock> buttocks; ///< from the centreline outward
  std::vector<Height> heights;   ///< from the bottom upward
};
} // namespace carlin
