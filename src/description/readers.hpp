#pragma once

#include "node.hpp"

#include "carlin/description/model.hpp"

#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

/// One reader a section of the model file. Each takes the node of the section, complains into the
/// findings of the pass, and returns what could be read.
namespace carlin::reading
{
struct Chapter;
struct Section;
class Fields;

/// Kind of every named plane (buttock, height or station), the built-in ones included.
using Planes = std::map<std::string, Surface>;
Planes planes_of(const std::optional<Hull>& hull);
Refers refers_to(Surface plane_kind);

Craft read_craft(const Node& node);
double read_mesh_size(const Node& node);
std::vector<Material> read_materials(const Node& node);
std::vector<Schedule> read_schedules(const Node& node);
std::vector<Profile> read_profiles(const Node& node);
Criteria read_criteria(const Node& node);
void read_stiffness(const Node& node, Model& model);

std::optional<Hull> read_hull(const Node& node);
const Section& offsets_section();
std::optional<HullOffsets> read_offsets(const Node& node);
/// Table of offsets from a CSV file; complaints carry its own lines. `node` is the value that names
/// the file.
std::vector<OffsetStation> read_offset_file(const Node& node);

/// What `on` says.
struct SurfacePlanes
{
  Surface surface = Surface::bottom;
  bool is_list = false;
  std::vector<std::string> planes; ///< "" for bottom, side and deck; empty: not readable
};
SurfacePlanes read_surface(const Node& node);

/// What may be added: the sections of parts, at top level or below `add`.
struct Parts
{
  std::vector<PlatePart> plates;
  std::vector<MemberPart> members;
  std::vector<Joint> joints;
  std::vector<Equipment> equipment;
  /// Openings that hatches make: the part (or family) they lie in and the rectangle.
  std::vector<std::pair<std::string, CutOut>> openings;
};

void read_plates(const Node& node, PlateKind kind, Parts& parts);
/// @param known Plates of the base and of this section, among which `in` is looked up.
void read_hatches(const Node& node, const std::vector<PlatePart>& known, Parts& parts);
void read_members(const Node& node, const Planes& planes, Parts& parts);
void read_joints(const Node& node, Parts& parts);
void read_equipment(const Node& node, Parts& parts);
FootprintArea read_footprint(const Node& node);
/// Ranges and sides of a cut-out or an edit, from the fields of a section that has these keys.
CutOut read_region(const Fields& fields);

Frame read_frame(const Node& node);
std::vector<Tank> read_tanks(const Node& node, bool has_rigid_bed);

/// @param model Has its base parts and tanks already.
std::vector<Configuration> read_configurations(const Node& node, const Model& model,
                                               const Planes& planes);
std::vector<LoadCase> read_cases(const Node& node);

/// Looks up every reference and complains of names that do not exist.
void check_references(const Model& model, Findings& findings);
/// "material 'x' does not exist; did you mean 'y'? there are y, z".
std::string does_not_exist(std::string_view kind, const std::string& name,
                           const std::vector<std::string>& known);
/// Rules that concern several sections.
void check_model(const Model& model, Findings& findings);

Chapter craft_chapter();
Chapter material_chapter();
Chapter hull_chapter();
Chapter part_chapter();
Chapter member_chapter();
Chapter frame_chapter();
Chapter tank_chapter();
Chapter configuration_chapter();
Chapter case_chapter();
Chapter criteria_chapter();
Chapter model_chapter();
Chapter bed_chapter();
} // namespace carlin::reading
