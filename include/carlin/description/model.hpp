#pragma once

#include "carlin/description/cases.hpp"
#include "carlin/description/hull.hpp"
#include "carlin/description/parts.hpp"
#include "carlin/description/tanks.hpp"

#include <filesystem>
#include <map>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace carlin
{
/// Figures of the craft as a whole.
struct Craft
{
  std::string name;
  FileLocation where;
  std::optional<double>
      displacement; ///< of the base configuration, everything aboard but tanks added later [kg]
  std::optional<Vector3> centre_of_gravity; ///< of that displacement [m]
  double waterline_length = 0.0;            ///< [m]
  double chine_beam = 0.0;                  ///< at 0.4 of the waterline length from aft [m]
  double deadrise = 0.0;                    ///< there [rad]
  double speed = 0.0;                       ///< largest, loaded [m/s]
  char design_category = 'C';               ///< A to D, ISO 12217
  double weld_allowance = 0.0;              ///< added to all modelled metalwork [-], 0.06 = 6 %
  double reference_temperature = 288.15;    ///< of hull and tanks at the fitting [K]
};

enum class Standing
{
  base,  ///< what is compared with; shown
  shown, ///< shown, not counted in the exit status
  judged ///< checks count
};

/// One edit of a configuration.
struct Edit
{
  enum class Kind
  {
    cut,    ///< members (whole or between planes)
    open,   ///< plating: a rectangle taken out
    replace ///< other schedule or profile, whole or between stations
  };
  Kind kind = Kind::cut;
  std::string part; ///< part name, or family name: all of it
  CutOut region;    ///< empty ranges: the whole part
  std::string with; ///< schedule or profile for replace
};

/// A state of the structure: a named set of edits on another configuration.
struct Configuration : Named
{
  std::string based_on; ///< empty for the base
  Standing standing = Standing::shown;
  std::vector<Edit> edits;
  std::vector<PlatePart> plates;    ///< added
  std::vector<MemberPart> members;  ///< added
  std::vector<Joint> joints;        ///< added
  std::vector<Equipment> equipment; ///< added
  std::vector<std::string> removed_equipment;
  std::vector<std::string> tanks; ///< names of the tanks aboard in this configuration
};

/// Chosen limits. What is not given here has the default and source of `checks`.
struct Criteria
{
  std::map<std::string, double> limits; ///< by name of the criterion, SI
  std::map<std::string, std::string>
      written; ///< the same as written, "120 MPa": whoever knows the dimension can check it
  std::map<std::string, FileLocation> where;
};

/// Everything a model file says, checked for units, ranges and names; no geometry worked out.
struct Model
{
  std::filesystem::path file;
  Craft craft;
  double mesh_size = 0.0; ///< asked [m]
  std::vector<Material> materials;
  std::vector<Schedule> schedules;
  std::vector<Profile> profiles;
  std::optional<Hull> hull;      ///< absent: structure of points only
  std::vector<PlatePart> plates; ///< of the base
  std::vector<MemberPart> members;
  std::vector<Joint> joints;
  std::vector<Equipment> equipment;
  std::optional<Frame> frame;
  bool rigid_bed = false; ///< feet stand on a rigid bed; hull and frame are absent
  std::vector<Tank> tanks;
  std::vector<Configuration> configurations; ///< the base first; never empty
  std::vector<LoadCase> cases;
  Criteria criteria;
  std::vector<std::string>
      girder_bulkheads; ///< two station names: the chord of the girder's deflection
  std::vector<std::string>
      bays; ///< names of stations that bound the bays, from aft; empty: bulkheads of the base
};

/// Structure after a configuration's edits: plain lists, nothing refers to another configuration.
struct ConfiguredCraft
{
  std::string name;
  Standing standing = Standing::shown;
  std::vector<PlatePart> plates;
  std::vector<MemberPart> members;
  std::vector<Joint> joints;
  std::vector<Equipment> equipment;
  std::vector<Tank> tanks;
};

/// Reads and checks a model file (YAML), with the CSV tables it names.
/// @throws ModelError with all problems found in one pass; ModelError too if it cannot be opened.
Model read_model(const std::filesystem::path& file);

/// The same from text; `file` names it in messages and is where CSV tables are looked for.
Model read_model_text(const std::string& text, const std::filesystem::path& file);

/// Structure of one configuration: the base's parts with the chain of edits applied in order.
/// A replaced region becomes a part of its own, named "<part> (<configuration>)".
/// @throws ModelError for a name that does not exist (read_model has found those already).
ConfiguredCraft configured(const Model& model, const std::string& configuration);

/// What a model says that is no error but should be read: "tank-1: stated growth of length is a
/// strain of 2.5 %, more than fibre ultimate over burst ratio 0.93 %: ...". One line each.
std::vector<std::string> warnings(const Model& model);

/// Reference of the whole file in Markdown, its tables made from the reader's own keys.
std::string model_reference();
} // namespace carlin
