#include "output_sample.hpp"

#include <catch2/catch.hpp>
#include <fstream>
#include <iterator>
#include <unistd.h>

namespace carlin
{
namespace
{
constexpr Index node_count = 8;

Structure sample_structure(const Mesh& mesh, Standing standing)
{
  Structure structure;
  structure.mesh = &mesh;
  for (const Vector3& point : mesh.points)
    structure.nodes.push_back(point);
  structure.node_point = {0, 1, 2, 3, 4, 5, 6, 7};
  structure.shells = {{{0, 1, 4, 3}, 0, 0, 0}, {{1, 2, 5, 4}, 0, 0, 1}, {{4, 5, 6, 6}, 1, 0, 2}};
  Member member;
  member.nodes = {0, 1};
  member.part = 2;
  member.section = 0;
  member.offset_1 = {0.0, 0.0, 0.04};
  member.offset_2 = {0.0, 0.0, 0.05};
  structure.members = {member};
  JointSpring spring;
  spring.joint = 0;
  spring.node_part = 6;
  spring.node_other = 7;
  spring.stiffness = {1e6, 2e6, 3e6, 4e3};
  spring.tributary_length = 0.25;
  structure.joints = {spring};

  ShellSection section;
  section.A << 4.0e8, 1.2e8, 0.0, 1.2e8, 4.0e8, 0.0, 0.0, 0.0, 1.4e8;
  section.B = 0.003 * section.A;
  section.D = 1.5e-5 * section.A;
  section.shear = 1.1e8 * Matrix2::Identity();
  section.thickness = 0.006;
  section.offset = 0.003;
  section.mass_per_area = 16.0;
  structure.shell_sections = {section};
  MemberSection profile =
      member_section(flat_bar_constants(0.07, 0.007), 70.0e9, 0.33, 2660.0, 23.0e-6);
  profile.shear_stiffness_y = std::numeric_limits<double>::infinity();
  structure.member_sections = {profile};
  structure.node_area = VectorX::Constant(node_count, 0.125);
  structure.mass.resize(6 * node_count, 6 * node_count);
  for (Index freedom = 0; freedom < 6 * node_count; ++freedom)
    structure.mass.insert(freedom, freedom) =
        freedom % 6 < 3 ? 2.0 + static_cast<double>(freedom / 6) : 0.01;
  if (standing == Standing::base) // the other one floats
    structure.supported = {{0, 0.001, 0.0, 0}, {1, 0.0, 5e5, 0}};
  return structure;
}

std::shared_ptr<Mesh> sample_mesh()
{
  auto mesh = std::make_shared<Mesh>();
  mesh->points = {{0, 0, 0}, {1, 0, 0}, {2, 0, 0},   {0, 1, 0.1},
                  {1, 1, 0}, {2, 1, 0}, {1.5, 2, 0}, {1.5, 2, 0}};
  MeshPart plate, hatch, bar;
  plate.name = "bottom";
  hatch.name = "hatch \"A\", port";
  bar.name = "girder-2";
  bar.kind = MeshPart::Kind::member;
  mesh->parts = {plate, hatch, bar};
  mesh->cells = {{{0, 1, 4, 3}, 0}, {{1, 2, 5, 4}, 0}, {{4, 5, 6, -1}, 1}};
  Run run;
  run.part = 2;
  run.points = {0, 1, 2};
  mesh->runs = {run};
  Joint joint;
  joint.name = "hatch-edge";
  mesh->joints = {joint};
  return mesh;
}

Tank sample_tank()
{
  Tank tank;
  tank.name = "tank-1";
  tank.axis_from = {0.0, 0.5, 0.5};
  tank.axis_to = {2.0, 0.5, 0.5};
  tank.diameter = 0.5;
  tank.mass = 115.0;
  tank.contents_mass = 7.5;
  tank.bending_stiffness = 6.6e7;
  tank.axial_stiffness = 2.2e9;
  Collar fixed, sliding;
  fixed.name = "fore";
  fixed.position = 1.75;
  Foot foot;
  foot.name = "port";
  foot.footprint.centre = {1.75, 0.5, 0.0};
  foot.stiffness = {2e7, 2e7, 2e7, 1e5, 1e5, 1e5};
  fixed.feet = {foot};
  sliding = fixed;
  sliding.name = "aft";
  sliding.kind = CollarKind::sliding;
  sliding.position = 0.25;
  sliding.ring = LinedRing{0.25, 0.08, 1e9, 1e-4, false};
  sliding.stroke_aft = 0.012;
  sliding.feet[0].footprint.centre = {0.25, 0.5, 0.0};
  tank.collars = {sliding, fixed};
  return tank;
}

Footprint sample_footprint(const Structure& structure, Index node, const Vector3& point)
{
  Footprint footprint;
  footprint.point = point;
  footprint.nodes = {node};
  footprint.areas = {1.0};
  footprint.weights.resize(6 * static_cast<Index>(structure.nodes.size()), 6);
  for (Index component = 0; component < 6; ++component)
    footprint.weights.insert(6 * node + component, component) = 1.0;
  return footprint;
}

MountStageResult sample_mounts(const std::string& name)
{
  CollarResult sliding;
  sliding.force << -900.0, 10.0, 600.0, 0.0, 1.0, 2.0;
  sliding.clamping_force = 6000.0;
  sliding.friction_limit = 900.0;
  sliding.friction_force = -900.0;
  sliding.slip = 0.0021;
  sliding.stroke_left_aft = 0.0141;
  sliding.stroke_left_forward = std::numeric_limits<double>::infinity();
  sliding.hold = Hold::slips;
  sliding.foot_forces = {Vector6::Constant(5.0)};
  CollarResult fixed = sliding;
  fixed.force = -sliding.force;
  fixed.hold = Hold::keyed;
  fixed.displacement = {0.0, 0.0, -0.001};
  TankResult tank;
  tank.collars = {sliding, fixed};
  for (const double position : {0.0, 0.25, 0.25, 1.75, 2.0})
  {
    TankSection section;
    section.position = position;
    section.displacement = {0.001 * position, 0.0, -0.001};
    section.axial_force = position > 0.0 ? 900.0 : 0.0;
    tank.sections.push_back(section);
  }
  tank.largest_axial_force = 900.0;
  MountStageResult result;
  result.name = name;
  result.tanks = {tank};
  return result;
}

ConfigurationSolution sample_configuration(const std::string& name, Standing standing)
{
  ConfigurationSolution configuration;
  configuration.craft.name = name;
  configuration.craft.standing = standing;
  configuration.mesh = sample_mesh();
  configuration.structure =
      std::make_shared<const Structure>(sample_structure(*configuration.mesh, standing));
  configuration.mass_account = {{"bottom", "plating", 100.0, {1.0, 0.0, 0.0}},
                                {"girder-2", "members", 20.0, {1.0, 0.0, 0.1}}};
  BayStiffness bay;
  bay.from = "bulkhead-1";
  bay.to = "bulkhead-2";
  bay.length = 3.0;
  bay.bending = 2.5e8;
  bay.torsion = 1.0e8;
  bay.torsion_per_angle = bay.torsion / bay.length;
  configuration.stiffness.bays = {bay};
  StageSolution stage;
  stage.name = "fitting";
  stage.displacement = VectorX::Zero(6 * node_count);
  stage.applied = VectorX::Zero(6 * node_count);
  StageSolution landing = stage;
  landing.name = "landing / hard";
  landing.displacement = sample_displacement();
  landing.applied[6 * 4 + 2] = 1234.5;
  landing.applied[6 * 4 + 3] = -7.25;
  landing.shell_pressures = {{1, 3.0e4}};
  configuration.cases = {{"landing, midships", CaseClass::rare, {stage, landing}}};
  return configuration;
}

Check sample_check(const std::string& configuration, double demand, std::optional<double> limit)
{
  Check check;
  check.name = "plate stress";
  check.subject = "girder-2 web, between frame-5 and frame-6";
  check.place = "x 4.35 m, y -0.42 m, z 0.31 m";
  check.configuration = configuration;
  check.load_case = "landing, midships";
  check.stage = "landing / hard";
  check.demand = demand;
  check.limit = limit;
  check.unit = "Pa";
  check.formula = "welded yield over 1.25";
  check.source = "common practice, no source";
  if (limit)
    check.utilisation = demand / *limit;
  check.verdict = !limit ? Verdict::not_judged : demand <= *limit ? Verdict::met : Verdict::not_met;
  if (!limit)
    check.remark = "ask the tank's maker for this limit";
  return check;
}
} // namespace

VectorX sample_displacement()
{
  VectorX displacement = VectorX::Zero(6 * node_count);
  for (Index node = 0; node < node_count; ++node)
    displacement.segment<3>(6 * node) = Vector3(0.01, -0.02, 0.03);
  displacement[6 * 4 + 2] += 0.0123456789012345;
  return displacement;
}

RunResult sample_result()
{
  RunResult result;
  result.model.file = "nowhere/launch.yaml";
  result.model.craft.name = "launch";
  result.model.mesh_size = 0.1;
  result.configurations = {sample_configuration("as built", Standing::base),
                           sample_configuration("converted", Standing::judged)};
  ConfigurationSolution& converted = result.configurations[1];
  converted.mass_account.push_back({"tank-1", "tanks", 115.0, {1.0, 0.5, 0.5}});
  converted.mass_account.erase(converted.mass_account.begin() + 1);
  converted.stiffness.bays[0].bending = 2.0e8;
  converted.craft.tanks = {sample_tank()};
  converted.feet = {{0, 0, 0, {0.25, 0.5, 0.0}}, {0, 1, 0, {1.75, 0.5, 0.0}}};
  converted.footprints = {sample_footprint(*converted.structure, 0, {0.25, 0.5, 0.0}),
                          sample_footprint(*converted.structure, 2, {1.75, 0.5, 0.0})};
  for (StageSolution& stage : converted.cases[0].stages)
    stage.mounts_low = stage.mounts_high = sample_mounts(stage.name);
  result.checks = {
      sample_check("converted", 142.4e6, 125.0e6), sample_check("converted", 5200.0, std::nullopt),
      sample_check("converted", 65.0e6, 125.0e6), sample_check("converted", 90.0e6, 125.0e6),
      sample_check("as built", 150.0e6, 125.0e6)};
  result.quality.cells = 3;
  result.audit.largest_pin_reaction = 2.5e-12;
  result.timings = {{"as built: factor", 0.5}, {"converted: factor", 0.25}};
  result.command_line = "carlin check launch.yaml";
  return result;
}

TestFolder::TestFolder(const std::string& name)
    : path_(std::filesystem::temp_directory_path() /
            ("carlin-" + name + "-" + std::to_string(::getpid())))
{
  std::filesystem::remove_all(path_);
  std::filesystem::create_directories(path_);
}

TestFolder::~TestFolder()
{
  std::error_code ignored;
  std::filesystem::remove_all(path_, ignored);
}

std::string content(const std::filesystem::path& file)
{
  std::ifstream stream(file, std::ios::binary);
  INFO(file);
  REQUIRE(stream.good());
  return {std::istreambuf_iterator<char>(stream), {}};
}
} // namespace carlin
