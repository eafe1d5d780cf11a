// Members by elements alone: A1 to A8, A13, A15 of the verification book, closed forms (computed).
// Round-off tolerances: 1e-10 for few elements, 1e-8 for many or mixed stiffness.
#include "element_model.hpp"
#include "verification_record.hpp"

#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <numbers>
#include <string>

using namespace carlin;
using namespace carlin::testing;

namespace
{
constexpr double G = 70e9 / 2.66;
constexpr double infinity = std::numeric_limits<double>::infinity();

/// Section S1 of the book: 0.04 x 0.06, upright along z.
MemberSection section_s1()
{
  return member_section(flat_bar_constants(0.06, 0.04), 70e9, 0.33, 0.0, 23e-6);
}

MemberSection shear_rigid(MemberSection section)
{
  section.shear_stiffness_y = section.shear_stiffness_z = infinity;
  return section;
}

/// Nodes on a line, one member between neighbours.
ElementModel line(const std::vector<Vector3>& places, const MemberSection& section,
                  const Vector3& upright)
{
  ElementModel model;
  for (const Vector3& place : places)
    model.add_node(place);
  for (Index i = 0; i + 1 < static_cast<Index>(places.size()); ++i)
  {
    ModelMember member;
    member.nodes = {i, i + 1};
    member.section = section;
    member.upright = upright;
    model.add_member(member);
  }
  return model;
}

void load_lines(ElementModel& model, const Vector3& force_per_length)
{
  for (Index m = 0; m < static_cast<Index>(model.members().size()); ++m)
    model.add_member_load(m, member_line_load(model.geometry(m),
                                              model.members()[static_cast<std::size_t>(m)].section,
                                              force_per_length));
}

double recorded(const char* subject, const char* quantity, double expected, double computed)
{
  record(
      {subject, "closed form (computed)", quantity, expected, computed, ToleranceClass::round_off});
  return computed;
}
} // namespace

TEST_CASE("A cantilever under an end force is exact with one member, in any direction",
          "[verification][beam]")
{
  // A1.
  struct Row
  {
    double length, deflection, slope;
  };
  for (const Row& row : {Row{2.0, 0.0529480529100529, 0.0396825396825397},
                         Row{0.2, 5.67100529100529e-5, 3.96825396825397e-4}})
    for (const bool is_turned : {false, true})
    {
      const Vector3 along = is_turned ? Vector3(1.0, 2.0, -2.0) / 3.0 : Vector3(Vector3::UnitX());
      const Vector3 y = Vector3::UnitZ().cross(along).normalized();
      const Vector3 z = along.cross(y);
      ElementModel model =
          line({Vector3::Zero(), row.length * along}, section_s1(), Vector3::UnitZ());
      model.fix(0, "uvwabc");
      Vector6 force;
      force << -1000.0 * z, Vector3::Zero();
      model.add_forces(1, force);
      model.solve();
      const Vector6 tip = model.motion(1);
      CHECK(recorded("A1 cantilever, end force, 1 member", "deflection [m]", -row.deflection,
                     tip.head<3>().dot(z)) == Approx(-row.deflection).epsilon(1e-10));
      CHECK(tip.tail<3>().dot(y) == Approx(row.slope).epsilon(1e-10));
      const MemberForces forces = model.forces(0);
      CHECK(forces.end_1(4) == Approx(1000.0 * row.length).epsilon(1e-10)); // top in tension
      CHECK(forces.end_1(2) == Approx(-1000.0).epsilon(1e-10));
      CHECK(std::abs(forces.end_2(4)) < 1e-7);
      CHECK(member_stress(model.members()[0].section, forces.end_1, Vector2(0.0, 0.03)) ==
            Approx(1000.0 * row.length * 0.03 / 7.2e-7).epsilon(1e-10));
    }
}

TEST_CASE("A uniform load with shear deflection is exact at the nodes", "[verification][beam]")
{
  // A2. (The book prints the stubby prop reaction as 383.375939849924; its own formula gives
  // 383.375939989924.)
  struct Row
  {
    double length, load, cantilever, simple, clamped, prop, clamp_moment;
  };
  for (const Row& row : {Row{2.0, 500.0, 0.0198602698412698, 2.07154894179894e-3,
                             4.18109788359788e-4, 375.089710569869, 249.820578860263},
                         Row{0.2, 5000.0, 2.17412698412698e-5, 2.54179894179894e-6,
                             8.88359788359789e-7, 383.375939989924, 23.3248120020153}})
  {
    const Vector3 q(0.0, 0.0, -row.load);
    const double L = row.length;
    const auto make = [&](int count)
    {
      std::vector<Vector3> places;
      for (int i = 0; i <= count; ++i)
        places.emplace_back(L * i / count, 0.0, 0.0);
      ElementModel model = line(places, section_s1(), Vector3::UnitZ());
      load_lines(model, q);
      return model;
    };
    ElementModel cantilever = make(1);
    cantilever.fix(0, "uvwabc");
    cantilever.solve();
    CHECK(-cantilever.motion(1, 2) == Approx(row.cantilever).epsilon(1e-10));
    // Hogging: top in tension, M_y positive on the face; end moments less the fixed-end moments.
    CHECK(cantilever.forces(0).end_1(4) == Approx(row.load * L * L / 2.0).epsilon(1e-10));
    CHECK(std::abs(cantilever.forces(0).end_2(4)) < 1e-9 * row.load * L * L);

    ElementModel simple = make(2);
    simple.fix(0, "uvwac");
    simple.fix(2, "vwac");
    simple.solve();
    CHECK(-simple.motion(1, 2) == Approx(row.simple).epsilon(1e-10));

    ElementModel clamped = make(2);
    clamped.fix(0, "uvwabc");
    clamped.fix(2, "uvwabc");
    clamped.solve();
    CHECK(-clamped.motion(1, 2) == Approx(row.clamped).epsilon(1e-10));

    ElementModel propped = make(1);
    propped.fix(0, "uvwabc");
    propped.fix(1, "vwac");
    propped.solve();
    CHECK(recorded("A2 propped cantilever, uniform load, 1 member", "reaction at the prop [N]",
                   row.prop, propped.reaction(1)(2)) == Approx(row.prop).epsilon(1e-10));
    CHECK(propped.forces(0).end_1(4) == Approx(row.clamp_moment).epsilon(1e-10));
  }
}

TEST_CASE("Fixed-end moments of a stubby beam carry the shear parameter", "[verification][beam]")
{
  // A3: L = 0.2, P = 1000 at L / 3.
  ElementModel model = line({Vector3::Zero(), Vector3(0.2 / 3.0, 0.0, 0.0), Vector3(0.2, 0.0, 0.0)},
                            section_s1(), Vector3::UnitZ());
  model.fix(0, "uvwabc");
  model.fix(2, "uvwabc");
  model.add_force(1, 2, -1000.0);
  model.solve();
  CHECK(model.reaction(0)(2) == Approx(724.209760689781).epsilon(1e-10));
  CHECK(recorded("A3 clamped beam, load at a third", "clamping moment [N m]", 27.9765316245336,
                 std::abs(model.reaction(0)(4))) == Approx(27.9765316245336).epsilon(1e-10));
  CHECK(model.reaction(2)(2) == Approx(275.790239310219).epsilon(1e-10));
  CHECK(std::abs(model.reaction(2)(4)) == Approx(16.4679128198108).epsilon(1e-10));
  CHECK(model.motion(1, 2) == Approx(-1.44127334180242e-6).epsilon(1e-10));
  CHECK(model.motion(1, 4) == Approx(5.07434691561852e-6).epsilon(1e-10));
}

TEST_CASE("A portal sways as frame theory says", "[verification][beam]")
{
  // A4; Kleinlogel, Rigid Frame Formulas, for the inextensible one.
  const auto portal = [](double factor)
  {
    MemberSection section = section_s1();
    section.axial_stiffness *= factor;
    section.shear_stiffness_y *= factor;
    section.shear_stiffness_z *= factor;
    ElementModel framed;
    for (const Vector3& place : {Vector3(0.0, 0.0, 0.0), Vector3(0.0, 0.0, 3.0),
                                 Vector3(4.0, 0.0, 3.0), Vector3(4.0, 0.0, 0.0)})
      framed.add_node(place);
    for (Index i = 0; i < 3; ++i)
    {
      // The upright axis lies in the plane of the frame, so that EI_y bends everywhere.
      ModelMember member;
      member.nodes = {i, i + 1};
      member.section = section;
      member.upright = i == 1 ? Vector3(Vector3::UnitZ()) : Vector3(Vector3::UnitX());
      framed.add_member(member);
    }
    for (Index node = 0; node < 4; ++node)
      framed.fix(node, node == 0 || node == 3 ? "uvwabc" : "vac");
    framed.add_force(1, 0, 1000.0);
    framed.solve();
    return framed;
  };
  const ElementModel model = portal(1.0);
  CHECK(recorded("A4 portal, sway", "sway [m]", 0.0345417193805385, model.motion(1, 0)) ==
        Approx(0.0345417193805385).epsilon(1e-8));
  CHECK(model.motion(2, 0) == Approx(0.0345298160606236).epsilon(1e-8));
  CHECK(model.motion(1, 4) == Approx(8.12605575076744e-3).epsilon(1e-8));
  CHECK(model.reaction(0)(0) == Approx(-500.06056357071).epsilon(1e-8));
  CHECK(model.reaction(0)(2) == Approx(-306.759300764783).epsilon(1e-8));
  CHECK(model.reaction(0)(4) == Approx(-886.608581968958).epsilon(1e-8));
  CHECK(model.reaction(3)(0) == Approx(-499.93943642929).epsilon(1e-8));
  CHECK(model.reaction(3)(4) == Approx(-886.354214972131).epsilon(1e-8));
  // Inextensible limit: u(f) = limit + c / f + O(1/f^2), so 2 u(2f) - u(f) is the limit to about
  // (1.3e-3 / f)^2. A factor of 1e6 in one go leaves 2.5e-8: the axial stiffness at B, 5.6e13 N/m,
  // has units in its last place of 0.008 N/m beside the sway's 2e4 N/m.
  const ElementModel once = portal(1e3);
  const ElementModel twice = portal(2e3);
  CHECK(2.0 * twice.motion(1, 0) - once.motion(1, 0) == Approx(0.0344967532467532).epsilon(1e-8));
  CHECK(2.0 * twice.reaction(0)(4) - once.reaction(0)(4) ==
        Approx(-886.363636363636).epsilon(1e-8));
  CHECK(2.0 * twice.reaction(0)(2) - once.reaction(0)(2) ==
        Approx(-306.818181818182).epsilon(1e-8));
}

TEST_CASE("A continuous beam shares its load, with and without shear and a sunk support",
          "[verification][beam]")
{
  // A5.
  struct Result
  {
    std::array<double, 3> reaction;
    double moment; // sagging +, at the middle support
  };
  const auto spans =
      [](double first, double second, const MemberSection& section, double load, double sunk)
  {
    ElementModel model =
        line({Vector3::Zero(), Vector3(first, 0.0, 0.0), Vector3(first + second, 0.0, 0.0)},
             section, Vector3::UnitZ());
    load_lines(model, Vector3(0.0, 0.0, -load));
    for (Index node = 0; node < 3; ++node)
      model.fix(node, "uvwac");
    model.prescribe(1, 2, -sunk);
    model.solve();
    return Result{{model.reaction(0)(2), model.reaction(1)(2), model.reaction(2)(2)},
                  -model.forces(0).end_2(4)};
  };
  const MemberSection flexible = section_s1();
  const MemberSection rigid = shear_rigid(flexible);
  const Result equal = spans(2.0, 2.0, rigid, 1000.0, 0.0);
  CHECK(equal.reaction[1] == Approx(2500.0).epsilon(1e-8));
  CHECK(equal.moment == Approx(-500.0).epsilon(1e-8));
  const Result sheared = spans(2.0, 2.0, flexible, 1000.0, 0.0);
  CHECK(recorded("A5 two spans, shear kept", "middle reaction [N]", 2499.64115772053,
                 sheared.reaction[1]) == Approx(2499.64115772053).epsilon(1e-8));
  CHECK(sheared.moment == Approx(-499.641157720525).epsilon(1e-8));
  const Result sunk = spans(2.0, 2.0, flexible, 0.0, 1e-3);
  CHECK(sunk.reaction[1] == Approx(-37.7728715236717).epsilon(1e-8));
  CHECK(sunk.moment == Approx(37.7728715236717).epsilon(1e-8));
  const Result unequal = spans(2.0, 3.0, rigid, 1000.0, 0.0);
  CHECK(unequal.moment == Approx(-875.0).epsilon(1e-8));
  CHECK(unequal.reaction[0] == Approx(562.5).epsilon(1e-8));
  CHECK(unequal.reaction[1] == Approx(3229.1666666667).epsilon(1e-8));
  CHECK(unequal.reaction[2] == Approx(1208.3333333333).epsilon(1e-8));
}

TEST_CASE("Offsets turn forces the right way", "[verification][beam]")
{
  // A6, GJ = G 3.1e-7.
  MemberSection section = section_s1();
  section.torsional_stiffness = G * 3.1e-7;
  const auto solve =
      [&](const Vector3& offset_1, const Vector3& offset_2, Index component, double force)
  {
    ElementModel model;
    model.add_node(Vector3::Zero());
    model.add_node(Vector3(2.0, 0.0, 0.0));
    model.add_member({{0, 1}, section, offset_1, offset_2, Vector3::UnitZ()});
    model.fix(0, "uvwabc");
    model.add_force(1, component, force);
    model.solve();
    return model;
  };
  const Vector3 up(0.0, 0.0, 0.1);
  const ElementModel pulled = solve(up, up, 0, 1000.0);
  CHECK(pulled.motion(1, 0) == Approx(4.08730158730159e-4).epsilon(1e-10));
  CHECK(recorded("A6a offset member, pull", "deflection [m]", 3.96825396825397e-3,
                 pulled.motion(1, 2)) == Approx(3.96825396825397e-3).epsilon(1e-10));
  CHECK(pulled.motion(1, 4) == Approx(-3.96825396825397e-3).epsilon(1e-10));

  const ElementModel pushed = solve(up, up, 1, 1000.0);
  CHECK(pushed.motion(1, 1) == Approx(0.121537231950845).epsilon(1e-10));
  CHECK(pushed.motion(1, 3) == Approx(0.0245161290322581).epsilon(1e-10));
  CHECK(pushed.motion(1, 5) == Approx(0.0892857142857143).epsilon(1e-10));
  CHECK(pushed.reaction(0)(1) == Approx(-1000.0).epsilon(1e-10));
  CHECK(std::abs(pushed.reaction(0)(3)) < 1e-7);
  CHECK(pushed.reaction(0)(5) == Approx(-2000.0).epsilon(1e-10));

  const ElementModel ends = solve(Vector3(0.15, 0.0, 0.0), Vector3(-0.15, 0.0, 0.0), 2, -1000.0);
  CHECK(ends.motion(1, 2) == Approx(-0.0418858052910053).epsilon(1e-10));
  CHECK(ends.motion(1, 4) == Approx(0.0337301587301587).epsilon(1e-10));
}

TEST_CASE("Two eccentric members act as one section, with the known error under shear",
          "[verification][beam]")
{
  // A7: plate strip 0.4 x 0.008, stiffener 0.006 x 0.08 on it; shear-rigid.
  const MemberSection strip =
      shear_rigid(member_section(flat_bar_constants(0.008, 0.4), 70e9, 0.33, 0.0, 0.0));
  const MemberSection bar =
      shear_rigid(member_section(flat_bar_constants(0.08, 0.006), 70e9, 0.33, 0.0, 0.0));
  const auto solve = [&](Index n, Index component, double load)
  {
    ElementModel model;
    for (Index i = 0; i <= n; ++i)
      model.add_node(Vector3(2.0 * static_cast<double>(i) / static_cast<double>(n), 0.0, 0.0));
    for (Index i = 0; i < n; ++i)
    {
      const Vector3 offset(0.0, 0.0, 0.044);
      model.add_member({{i, i + 1}, strip, Vector3::Zero(), Vector3::Zero(), Vector3::UnitZ()});
      model.add_member({{i, i + 1}, bar, offset, offset, Vector3::UnitZ()});
    }
    model.fix(0, "uvwabc");
    model.add_force(n, component, load);
    model.solve();
    return model;
  };
  for (const Index n : {1, 4})
  {
    const ElementModel bent = solve(n, 4, 1000.0);
    CHECK(bent.motion(n, 2) == Approx(-0.0264272232571821).epsilon(1e-10));
    CHECK(bent.motion(n, 0) == Approx(-1.51669281302088e-4).epsilon(1e-10));
    const MemberForces forces = bent.forces(1);
    CHECK(recorded("A7 stiffened strip, end moment", "force in the stiffener [N]", 16986.9595058338,
                   forces.end_1(0)) == Approx(16986.9595058338).epsilon(1e-10));
    CHECK(member_stress(bar, forces.end_1, Vector2(0.0, 0.04)) ==
          Approx(72.3876115305e6).epsilon(1e-10));
    CHECK(member_stress(strip, bent.forces(0).end_2, Vector2(0.0, -0.004)) ==
          Approx(-9.0082361016e6).epsilon(1e-9));
  }
  const double exact = -0.0176181488381214;
  for (const Index n : {1, 2, 4, 8})
  {
    const double known = 2.959240 / (4.0 * static_cast<double>(n * n)); // I / sum I_own - 1
    const double error = solve(n, 2, -500.0).motion(n, 2) / exact - 1.0;
    CHECK(error == Approx(known).epsilon(1e-6));
  }
}

TEST_CASE("A stiffener under a shell strip bends with it as one section", "[verification][beam]")
{
  // A8: strip 2 x 0.4, nu = 0, moved inner nodes; stiffener along y = 0.
  ElementModel model;
  const Grid grid = add_grid(model, 4, 2, plate(70e9, 0.0, 0.008),
                             [](double s, double t)
                             {
                               const bool is_inner = s > 0.0 && s < 1.0;
                               const double skew = is_inner ? 0.12 * (t - 0.5) : 0.0;
                               return Vector3(2.0 * s + skew, 0.4 * (t - 0.5), 0.0);
                             });
  const MemberSection bar = member_section(flat_bar_constants(0.08, 0.006), 70e9, 0.0, 0.0, 0.0);
  const Vector3 offset(0.0, 0.0, 0.044);
  for (Index i = 0; i < 4; ++i)
    model.add_member(
        {{grid.node(i, 1), grid.node(i + 1, 1)}, bar, offset, offset, Vector3::UnitZ()});
  for (Index j = 0; j <= 2; ++j)
    model.fix(grid.node(0, j), "uwabc");
  model.fix(grid.node(0, 1), "v");
  const std::array<double, 3> width = {0.1, 0.2, 0.1};
  for (Index j = 0; j <= 2; ++j)
  {
    const double b = width[static_cast<std::size_t>(j)];
    model.add_force(grid.node(4, j), 0, -42467.39876458 * b);
    model.add_force(grid.node(4, j), 4, 39.46465339739 * b);
  }
  model.add_force(grid.node(4, 1), 0, 16986.9595058339);
  model.add_force(grid.node(4, 1), 4, 236.7879203844 + 0.044 * 16986.9595058339);
  model.solve();
  for (Index j = 0; j <= 2; ++j)
  {
    CHECK(recorded("A8 stiffener under a shell strip, moved nodes", "deflection [m]",
                   -0.0264272232571821,
                   model.motion(grid.node(4, j), 2)) == Approx(-0.0264272232571821).epsilon(1e-8));
    CHECK(model.motion(grid.node(4, j), 0) == Approx(-1.51669281302e-4).epsilon(1e-8));
  }
  for (Index s = 0; s < 8; ++s)
    CHECK(model.state(s, 0.3, -0.4, 0.0).membrane.x() == Approx(-7.58346406510e-5).epsilon(1e-8));
}

TEST_CASE("Free growth makes no stress; held growth makes the known force", "[verification][beam]")
{
  // A13, dT = 80: arms grow with the member.
  const MemberSection section = section_s1();
  const auto heat = [](ElementModel& model)
  {
    for (Index m = 0; m < static_cast<Index>(model.members().size()); ++m)
      model.add_member_load(m, member_thermal(model.geometry(m),
                                              model.members()[static_cast<std::size_t>(m)].section,
                                              80.0));
  };
  const Vector3 along = Vector3(1.0, 2.0, -2.0) / 3.0;
  ElementModel bar =
      line({Vector3::Zero(), 0.5 * along, 1.2 * along, 2.0 * along}, section, Vector3::UnitZ());
  bar.fix(0, "uvwabc");
  heat(bar);
  bar.solve();
  CHECK(bar.motion(3).head<3>().dot(along) == Approx(3.68e-3).epsilon(1e-8));
  for (Index m = 0; m < 3; ++m)
    CHECK(std::abs(bar.forces(m).end_1(0)) < 1e-9 * 309120.0);

  for (const double arm : {0.0, 0.15})
  {
    ElementModel held;
    held.add_node(Vector3::Zero());
    held.add_node(Vector3(2.0, 0.0, 0.0));
    held.add_member(
        {{0, 1}, section, Vector3(arm, 0.0, 0.0), Vector3(-arm, 0.0, 0.0), Vector3::UnitZ()});
    held.fix(0, "uvwabc");
    held.fix(1, "uvwabc");
    heat(held);
    held.solve();
    const double force = -309120.0 * 2.0 / (2.0 - 2.0 * arm);
    CHECK(recorded("A13 clamped bar, warmed", "force [N]", force, held.forces(0).end_1(0)) ==
          Approx(force).epsilon(1e-10));
  }
}

TEST_CASE("Heated plating with an equally heated eccentric member stays free of stress",
          "[verification][beam]")
{
  // A13, third row: dT = 80, the same alpha, moved nodes. Round-off 1e-9 of E alpha dT t.
  ElementModel model;
  const ShellSection section = isotropic_shell_section(70e9, 0.33, 0.0, 23e-6, 0.008, 0.0);
  const Grid grid = add_grid(model, 4, 2, section,
                             [](double s, double t)
                             {
                               const double skew = s > 0.0 && s < 1.0 ? 0.1 * (t - 0.5) : 0.0;
                               return Vector3(2.0 * s + skew, 0.4 * (t - 0.5), 0.0);
                             });
  const MemberSection bar = member_section(flat_bar_constants(0.08, 0.006), 70e9, 0.33, 0.0, 23e-6);
  const Vector3 offset(0.0, 0.0, 0.044);
  for (Index i = 0; i < 4; ++i)
  {
    model.add_member(
        {{grid.node(i, 1), grid.node(i + 1, 1)}, bar, offset, offset, Vector3::UnitZ()});
    model.add_member_load(i, member_thermal(model.geometry(i), bar, 80.0));
  }
  for (Index s = 0; s < 8; ++s)
    model.add_shell_load(s, shell_thermal(model.points(s), section, model.material_axis, 80.0));
  model.fix(grid.node(0, 0), "uvw");
  model.fix(grid.node(4, 0), "vw");
  model.fix(grid.node(0, 2), "w");
  model.solve();
  const double scale = 70e9 * 23e-6 * 80.0 * 0.008;
  for (Index s = 0; s < 8; ++s)
  {
    const ShellState state = model.state(s, 0.2, 0.5, 80.0);
    CHECK(state.force.norm() < 1e-9 * scale);
    CHECK(state.moment.norm() < 1e-9 * scale * 0.008);
  }
  for (Index m = 0; m < 4; ++m)
    CHECK(std::abs(model.forces(m).end_1(0)) < 1e-9 * scale);
  CHECK(model.motion(grid.node(4, 0), 0) == Approx(23e-6 * 80.0 * 2.0).epsilon(1e-8));
}

TEST_CASE("A force through the centroid of a channel twists it, one through its shear centre does "
          "not",
          "[verification][beam]")
{
  // A15: Saint-Venant twist 0.0680106026785714 of 500 N at 0.03125 from the shear centre.
  ProfileConstants channel;
  channel.area = 0.2 * 0.004;
  channel.second_moment_y = 1.33333333333333e-6;
  channel.second_moment_z = 2.08333333333333e-7;
  channel.torsion_constant = 0.2 * 0.004 * 0.004 * 0.004 / 3.0;
  channel.shear_area_y = channel.shear_area_z = infinity;
  channel.shear_centre_y = -0.03125;
  const MemberSection section = member_section(channel, 210e9, 0.3, 0.0, 0.0);
  const auto twist = [&](double node_y)
  {
    ElementModel model;
    model.add_node(Vector3(0.0, node_y, 0.0));
    model.add_node(Vector3(1.5, node_y, 0.0));
    const Vector3 offset(0.0, -node_y, 0.0);
    model.add_member({{0, 1}, section, offset, offset, Vector3::UnitZ()});
    model.fix(0, "uvwabc");
    model.add_force(1, 2, -500.0);
    model.solve();
    return model.motion(1, 3);
  };
  CHECK(recorded("A15 channel, load at the centroid", "twist [rad]", -0.0680106026785714,
                 twist(0.0)) == Approx(-0.0680106026785714).epsilon(1e-10));
  CHECK(std::abs(twist(-0.03125)) < 1e-14);
}
