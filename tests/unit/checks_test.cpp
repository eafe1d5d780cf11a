#include "hand_structure.hpp"

#include "carlin/checks/buckling.hpp"
#include "carlin/checks/checks.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <set>

using namespace carlin;
using carlin::testing::HandStructure;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinRel;

namespace
{
Check check_of(double demand, std::optional<double> limit, bool from_below = false)
{
  Check check;
  check.demand = demand;
  check.limit = limit;
  check.limit_from_below = from_below;
  return judged(check);
}

const Check* find(const std::vector<Check>& checks, const std::string& name,
                  const std::string& subject)
{
  for (const Check& check : checks)
    if (check.name == name && check.subject == subject)
      return &check;
  return nullptr;
}

/// A plate 0.6 x 0.4 m of 5 mm aluminium under uniform tension or compression along x.
struct Tension
{
  Model model;
  HandStructure hand;
  ConfigurationSolution configuration;

  explicit Tension(Index cells = 8)
  {
    Material metal;
    metal.name = "alloy";
    metal.youngs_modulus = 70e9;
    metal.poissons_ratio = 0.33;
    metal.yield_strength = 215e6;
    metal.welded_yield_strength = 125e6;
    model.materials.push_back(metal);
    Schedule schedule;
    schedule.name = "plate-5";
    schedule.material = "alloy";
    schedule.thickness = 0.005;
    model.schedules.push_back(schedule);
    const Index section =
        hand.add_section(isotropic_shell_section(70e9, 0.33, 2660.0, 0.0, 0.005, 0.0));
    const Index part = hand.add_plate_part("deck");
    hand.mesh.parts.back().material_use = "plate-5";
    hand.mesh.parts.back().surface = Surface::deck;
    hand.add_plate(part, section, {{{0, 0, 0}, {0.6, 0, 0}, {0.6, 0.4, 0}, {0, 0.4, 0}}},
                   cells + cells / 2, cells);
    hand.finish();
    configuration.craft.name = "converted";
    configuration.craft.standing = Standing::judged;
    configuration.mesh = std::make_shared<Mesh>(hand.mesh);
    configuration.structure = std::make_shared<Structure>(hand.structure);
    configuration.panels = find_panels(hand.structure);
  }

  StageSolution stage(const std::string& name, double stress) const
  {
    StageSolution result;
    result.name = name;
    result.displacement = VectorX::Zero(hand.structure.stiffness.rows());
    for (std::size_t n = 0; n < hand.structure.nodes.size(); ++n)
    {
      const Vector3& at = hand.structure.nodes[n];
      result.displacement.segment<3>(6 * static_cast<Index>(n)) =
          stress / 70e9 * Vector3(at.x(), -0.33 * at.y(), 0.0);
    }
    return result;
  }

  void add_case(const std::string& name, CaseClass load_class, std::vector<StageSolution> stages)
  {
    configuration.cases.push_back({name, load_class, std::move(stages)});
  }
};
} // namespace

TEST_CASE("A check is met up to a utilisation of one", "[unit][checks]")
{
  CHECK(check_of(50.0, 100.0).verdict == Verdict::met);
  CHECK(*check_of(50.0, 100.0).utilisation == 0.5);
  CHECK(check_of(100.0, 100.0).verdict == Verdict::met);
  CHECK(check_of(100.001, 100.0).verdict == Verdict::not_met);
  CHECK(check_of(-120.0, 100.0).verdict == Verdict::not_met); // compression counts as tension does
  CHECK(check_of(1.0, std::nullopt).verdict == Verdict::not_judged);
  CHECK(!check_of(1.0, std::nullopt).utilisation);
  CHECK(check_of(0.0, 0.0).verdict == Verdict::met);
  CHECK(check_of(1.0, 0.0).verdict == Verdict::not_met);
  CHECK(check_of(std::nan(""), 100.0).verdict == Verdict::not_met); // never silently met
}

TEST_CASE("Of a limit from below the utilisation is limit over found", "[unit][checks]")
{
  CHECK(*check_of(2.0, 1.0, true).utilisation == 0.5);
  CHECK(check_of(0.9, 0.9, true).verdict == Verdict::met);
  CHECK(check_of(0.5, 0.9, true).verdict == Verdict::not_met);
  CHECK(check_of(0.0, 0.003, true).verdict == Verdict::not_met); // at the stop
  CHECK(check_of(-0.001, 0.003, true).verdict == Verdict::not_met);
  CHECK(*check_of(std::numeric_limits<double>::infinity(), 0.003, true).utilisation == 0.0);
}

TEST_CASE("Not met comes before not judged, and that before met; each worst first",
          "[unit][checks]")
{
  const Check worst = check_of(300.0, 100.0), bad = check_of(150.0, 100.0),
              open = check_of(1.0, std::nullopt), near = check_of(90.0, 100.0),
              far = check_of(1.0, 100.0);
  CHECK(is_worse(worst, bad));
  CHECK(is_worse(bad, open));
  CHECK(is_worse(open, near));
  CHECK(is_worse(near, far));
  CHECK(!is_worse(far, far));
}

TEST_CASE("Every criterion has a name of its own, a text, a formula and a source", "[unit][checks]")
{
  std::set<std::string> names;
  for (const Criterion& criterion : known_criteria())
  {
    CAPTURE(criterion.name);
    CHECK(names.insert(criterion.name).second);
    CHECK(!criterion.text.empty());
    CHECK(!criterion.dimension_unit.empty());
    CHECK(!criterion.formula.empty());
    CHECK(!criterion.source.empty());
    CHECK((!criterion.default_limit || *criterion.default_limit > 0.0));
  }
  Model model;
  CHECK(criterion_limit(model, "torsion_stiffness_ratio") == 0.9);
  CHECK(!criterion_limit(model, "joint_load"));
  model.criteria.limits["torsion_stiffness_ratio"] = 0.95;
  CHECK(criterion_limit(model, "torsion_stiffness_ratio") == 0.95);
}

// Loads book, section 8, structural check values (computed there; 4 digits printed: P).
TEST_CASE("Plate buckling follows the closed form", "[verification][checks]")
{
  const auto long_plate = [](double E, double nu, double t, double b)
  { return BucklingPlate{E, nu, t, b, 100.0 * b, std::nullopt}; };
  CHECK_THAT(elastic_buckling_stress(long_plate(70e9, 0.33, 0.005, 0.3), 4.0),
             WithinRel(71.79e6, 1e-4));
  CHECK_THAT(elastic_buckling_stress(long_plate(12e9, 0.25, 0.008, 0.4), 4.0),
             WithinRel(16.84e6, 3e-4));
  CHECK_THAT(elastic_buckling_stress(long_plate(206e9, 0.3, 0.004, 0.4), 4.0),
             WithinRel(74.47e6, 1e-4));
  CHECK_THAT(elastic_buckling_stress(long_plate(70e9, 0.33, 0.004, 0.3), 5.34),
             WithinRel(61.34e6, 1e-4));
  CHECK(critical_stress(50e6, 125e6) == 50e6);
  CHECK_THAT(critical_stress(125e6, 125e6), WithinRel(93.75e6, 1e-12)); // yield (1 - 1/4)
  const BucklingPlate plate = long_plate(70e9, 0.33, 0.005, 0.3);
  CHECK_THAT(buckling_usage(plate, {-71.79e6, 0.0, 0.0}), WithinRel(1.0, 1e-4));
  CHECK(buckling_usage(plate, {71.79e6, 50e6, 0.0}) == 0.0); // tension
  // A long plate pressed across its short side is a strip column: k = 1.
  CHECK_THAT(buckling_usage(plate, {0.0, -71.79e6 / 4.0, 0.0}), WithinRel(1.0, 1e-3));
}

TEST_CASE("Plate stress is judged by the limit of each class and the worst is named",
          "[unit][checks]")
{
  Tension plate;
  plate.add_case("still water", CaseClass::service,
                 {plate.stage("fitting", 10e6), plate.stage("filled", 60e6)});
  plate.add_case("landing", CaseClass::rare, {plate.stage("landing", 63e6)});
  plate.add_case("stop", CaseClass::accidental, {plate.stage("stopped", 70e6)});
  std::vector<Check> checks = make_checks(plate.model, plate.configuration, plate.configuration);
  const Check* check = find(checks, "plate stress", "deck");
  REQUIRE(check);
  // 60 / (0.75 x 125) = 0.64; 63 / (0.85 x 125) = 0.593; 70 / 125 = 0.56.
  CHECK_THAT(*check->utilisation, WithinRel(0.64, 1e-6));
  CHECK(check->load_case == "still water");
  CHECK(check->stage == "filled");
  CHECK(check->configuration == "converted");
  CHECK(check->verdict == Verdict::met);
  CHECK_THAT(check->remark, Contains("peak 60 MPa as found") && !Contains("too coarse"));
  CHECK_THAT(check->formula, Contains("0.75 x welded yield 125 MPa"));
  CHECK_THAT(check->place, Contains("x ") && Contains("y "));
  CHECK(std::is_sorted(checks.begin(), checks.end(), is_worse));

  SECTION("the model's own limit is used and cited")
  {
    plate.model.criteria.limits["plate_stress_service"] = 0.4;
    checks = make_checks(plate.model, plate.configuration, plate.configuration);
    check = find(checks, "plate stress", "deck");
    CHECK(check->verdict == Verdict::not_met);
    CHECK(check->source == "criteria of the model");
    CHECK(checks.front().name == "plate stress");
  }
  SECTION("parent yield is used only where no welded strength is given, and said")
  {
    plate.model.materials[0].welded_yield_strength.reset();
    checks = make_checks(plate.model, plate.configuration, plate.configuration);
    check = find(checks, "plate stress", "deck");
    CHECK_THAT(*check->utilisation, WithinRel(60.0 / (0.75 * 215.0), 1e-6));
    CHECK_THAT(check->remark, Contains("no welded strength of alloy given"));
  }
  SECTION("without any strength nothing is judged")
  {
    plate.model.materials[0].welded_yield_strength.reset();
    plate.model.materials[0].yield_strength.reset();
    checks = make_checks(plate.model, plate.configuration, plate.configuration);
    check = find(checks, "plate stress", "deck");
    CHECK(check->verdict == Verdict::not_judged);
    CHECK_THAT(check->remark, Contains("give the yield strength of alloy"));
  }
}

TEST_CASE("Displacements that are no numbers are refused, not passed", "[unit][checks]")
{
  Tension plate;
  StageSolution stage = plate.stage("filled", 60e6);
  stage.displacement[7] = std::nan("");
  plate.add_case("still water", CaseClass::service, {stage});
  CHECK_THROWS_WITH(make_checks(plate.model, plate.configuration, plate.configuration),
                    Contains("case 'still water', stage 'filled': displacements are not finite"));
}

TEST_CASE("A coarse mesh is said to be coarse", "[unit][checks]")
{
  Tension plate(4);
  plate.add_case("still water", CaseClass::service, {plate.stage("filled", 10e6)});
  SECTION("without pressure")
  {
    const std::vector<Check> checks =
        make_checks(plate.model, plate.configuration, plate.configuration);
    CHECK_THAT(find(checks, "plate stress", "deck")->remark,
               Contains("mesh too coarse here: 4 cells across") && !Contains("stands in"));
  }
  SECTION("under pressure the closed form stands in")
  {
    StageSolution& stage = plate.configuration.cases[0].stages[0];
    for (std::size_t s = 0; s < plate.hand.structure.shells.size(); ++s)
      stage.shell_pressures.emplace_back(static_cast<Index>(s), 50e3);
    const std::vector<Check> checks =
        make_checks(plate.model, plate.configuration, plate.configuration);
    const Check* check = find(checks, "plate stress", "deck");
    CHECK_THAT(check->remark, Contains("clamped panel formula 145 MPa stands in"));
    CHECK(check->verdict == Verdict::not_met); // 0.07566 x 6 x 50 kPa x 80^2 = 145 MPa
  }
}

TEST_CASE("A deck pressed together is judged for buckling", "[unit][checks]")
{
  Tension plate;
  plate.add_case("sagging", CaseClass::service, {plate.stage("wave", -30e6)});
  const std::vector<Check> checks =
      make_checks(plate.model, plate.configuration, plate.configuration);
  const Check* check = find(checks, "deck buckling", "deck");
  REQUIRE(check);
  // k 4, t/b 5/400: 40.38 MPa elastic, below half of 125 MPa.
  CHECK_THAT(check->demand, WithinRel(30.0 / 40.38, 1e-3));
  CHECK(check->limit == 0.8);
  CHECK(check->verdict == Verdict::met);
}

TEST_CASE("Stiffness is judged against the base from below; loaded ends and the base are not",
          "[unit][checks]")
{
  Tension plate;
  const auto bay = [](const std::string& from, double bending, double torsion, bool near)
  { return BayStiffness{from, from + "'", 3.0, bending, torsion, torsion / 3.0, near}; };
  ConfigurationSolution base;
  base.craft.standing = Standing::base;
  base.mass_properties.mass = 9500.0;
  base.stiffness.bays = {bay("a", 1e9, 1e9, true), bay("b", 1e9, 1e9, false)};
  base.stiffness.whole = bay("a", 1e9, 1e9, false);
  plate.configuration.mass_properties.mass = 10450.0;
  plate.configuration.stiffness.bays = {bay("a", 0.5e9, 0.5e9, true),
                                        bay("b", 0.98e9, 0.95e9, false)};
  plate.configuration.stiffness.whole = bay("a", 1.1e9, 1.2e9, false);

  const std::vector<Check> checks = make_checks(plate.model, plate.configuration, base);
  CHECK(find(checks, "bending stiffness", "a to a'")->verdict == Verdict::not_judged);
  CHECK_THAT(find(checks, "bending stiffness", "a to a'")->remark, Contains("within one depth"));
  const Check* bending = find(checks, "bending stiffness", "b to b'");
  CHECK(bending->verdict == Verdict::not_met);
  CHECK_THAT(*bending->utilisation, WithinRel(1.0 / 0.98, 1e-12));
  CHECK_THAT(bending->remark, Contains("1.100 times the base"));
  CHECK(find(checks, "torsional stiffness", "b to b'")->verdict == Verdict::met); // 0.95 >= 0.9
  CHECK(find(checks, "bending stiffness", "whole, a to a'")->verdict == Verdict::met);
  CHECK(make_checks(plate.model, base, base).empty());
}
