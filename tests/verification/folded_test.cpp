// Folded and stiffened shells by elements alone: C7.0, C7.1, C7.4 of the verification book.
#include "element_model.hpp"
#include "verification_record.hpp"

#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <map>
#include <string>
#include <tuple>

using namespace carlin;
using namespace carlin::testing;

namespace
{
/// Adds walls that share nodes where their places agree.
class JoinedModel
{
public:
  ElementModel model;

  Index node(const Vector3& place)
  {
    const auto key = std::make_tuple(std::llround(place.x() * 1e9), std::llround(place.y() * 1e9),
                                     std::llround(place.z() * 1e9));
    const auto [it, is_new] = numbers_.try_emplace(key, -1);
    if (is_new)
      it->second = model.add_node(place);
    return it->second;
  }

  void add_wall(Index n1, Index n2, const ShellSection& section,
                const std::function<Vector3(double, double)>& place)
  {
    const auto at = [&](Index i, Index j)
    {
      return node(place(static_cast<double>(i) / static_cast<double>(n1),
                        static_cast<double>(j) / static_cast<double>(n2)));
    };
    for (Index i = 0; i < n1; ++i)
      for (Index j = 0; j < n2; ++j)
        model.add_shell({at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)}, section);
  }

private:
  std::map<std::tuple<long long, long long, long long>, Index> numbers_;
};

/// Twist of a square box by shear flow on its free end, warping free at the root.
double box_twist(Index along, Index across)
{
  const double half = 0.1;
  const double length = 2.0;
  JoinedModel box;
  box.model.material_axis = Vector3::UnitX();
  const std::array<Vector3, 5> corner = {Vector3(0.0, -half, -half), Vector3(0.0, half, -half),
                                         Vector3(0.0, half, half), Vector3(0.0, -half, half),
                                         Vector3(0.0, -half, -half)};
  const double flow = 1000.0 / (2.0 * 0.04); // T / 2 b h
  for (std::size_t wall = 0; wall < 4; ++wall)
  {
    const Vector3 edge = corner[wall + 1] - corner[wall];
    const auto place = [&](double s, double t)
    { return Vector3(corner[wall] + t * edge + Vector3(length * s, 0.0, 0.0)); };
    box.add_wall(along, across, plate(210e9, 0.3, 0.005), place);
    for (Index j = 0; j < across; ++j)
    {
      const double t = static_cast<double>(j) / static_cast<double>(across);
      const double next = static_cast<double>(j + 1) / static_cast<double>(across);
      box.model.add_edge_force(box.node(place(1.0, t)), box.node(place(1.0, next)),
                               flow * edge / static_cast<double>(across));
      box.model.fix(box.node(place(0.0, t)), "vw");
    }
  }
  for (std::size_t i = 0; i < 3; ++i) // stops turning about y and z; the fourth shows any warping
    box.model.fix(box.node(corner[i]), "u");
  box.model.solve();
  const auto tip = [&](std::size_t i)
  { return box.model.motion(box.node(corner[i] + Vector3(length, 0.0, 0.0))); };
  const double level = (tip(1)(2) - tip(0)(2)) / (2.0 * half);
  const double upright = -(tip(2)(1) - tip(1)(1)) / (2.0 * half);
  CHECK(level == Approx(upright).epsilon(1e-6)); // square: both walls turn alike
  return 0.5 * (level + upright);
}
} // namespace

TEST_CASE("A box in torsion has Bredt's stiffness on a coarse mesh", "[verification][shell]")
{
  // C7.1: 6.18532e-4 (Bredt with the walls' own torsion, exact). Tolerance of the book 1 % at
  // 10 x 2, 0.4 % at 40 x 8; this drilling tie was measured at 6.1848, 6.1847, 6.1847e-4.
  for (const Index n : {1, 2, 4})
  {
    const double error = record({"C7.1 square box in torsion, " + std::to_string(10 * n) + " x " +
                                     std::to_string(2 * n) + " a wall",
                                 "Bredt with wall torsion", "twist [rad]", 6.18532e-4,
                                 box_twist(10 * n, 2 * n), ToleranceClass::discretisation});
    CHECK(std::abs(error) < 1e-3);
  }
}

TEST_CASE("Bending passes a fold whose drilling is the other leg's bending",
          "[verification][shell]")
{
  // C7.0: frame theory 0.0648122 and 0.0500150; column A 0.064770 and 0.049820 at 8 cells a leg;
  // tolerance 0.2 and 0.5 % at 8, order 2.
  const auto strip = [](Index n, const Vector3& force)
  {
    JoinedModel frame;
    frame.model.material_axis = Vector3::UnitY();
    const ShellSection section = plate(1e7, 0.0, 0.1);
    frame.add_wall(n, 2, section, [](double s, double t) { return Vector3(0.0, t, 5.0 * s); });
    frame.add_wall(n, 2, section, [](double s, double t) { return Vector3(3.0 * s, t, 5.0); });
    for (const double y : {0.0, 0.5, 1.0})
      frame.model.fix(frame.node(Vector3(0.0, y, 0.0)), "uvwabc");
    for (const double y : {0.0, 0.5})
      frame.model.add_edge_force(frame.node(Vector3(3.0, y, 5.0)),
                                 frame.node(Vector3(3.0, y + 0.5, 5.0)), 0.5 * force);
    frame.model.solve();
    return frame.model.motion(frame.node(Vector3(3.0, 0.5, 5.0))).head<3>().dot(force);
  };
  const auto order = [&](const Vector3& force)
  { return std::log2((strip(4, force) - strip(2, force)) / (strip(8, force) - strip(4, force))); };
  CHECK(std::abs(record({"C7.0 folded strip, load z, 8 a leg", "frame theory", "deflection [-]",
                         0.0648122, strip(8, Vector3::UnitZ()), ToleranceClass::discretisation})) <
        0.002);
  CHECK(std::abs(record({"C7.0 folded strip, load x, 8 a leg", "frame theory", "deflection [-]",
                         0.0500150, strip(8, Vector3::UnitX()), ToleranceClass::discretisation})) <
        0.005);
  CHECK(order(Vector3::UnitZ()) == Approx(2.0).margin(0.05));
  CHECK(order(Vector3::UnitX()) == Approx(2.0).margin(0.05));
}

TEST_CASE("Plating with a bar as member agrees with the bar as shells", "[verification][shell]")
{
  // C7.4, nu = 0. Shell and eccentric member 6.3890, 6.4019, 6.4008e-4 at 5, 10, 20 by an
  // independent trial; all shells (bar 4 high) 6.372, 6.422, 6.436e-4 with this drilling tie.
  const auto tip = [](Index n, bool is_member)
  {
    JoinedModel tee;
    tee.model.material_axis = Vector3::UnitX();
    const ShellSection section = plate(210e9, 0.0, 0.01);
    tee.add_wall(n, 2, section, [](double s, double t) { return Vector3(s, 0.2 * t - 0.1, 0.0); });
    if (is_member)
    {
      const MemberSection bar = member_section(flat_bar_constants(0.1, 0.01), 210e9, 0.0, 0.0, 0.0);
      for (Index i = 0; i < n; ++i)
      {
        const double from = static_cast<double>(i) / static_cast<double>(n);
        const double to = static_cast<double>(i + 1) / static_cast<double>(n);
        ModelMember member;
        member.nodes = {tee.node(Vector3(from, 0.0, 0.0)), tee.node(Vector3(to, 0.0, 0.0))};
        member.section = bar;
        member.offset_1 = member.offset_2 = Vector3(0.0, 0.0, -0.05);
        tee.model.add_member(member);
      }
    }
    else
    {
      tee.add_wall(n, 4, section, [](double s, double t) { return Vector3(s, 0.0, -0.1 * t); });
      for (int j = 1; j <= 4; ++j)
        tee.model.fix(tee.node(Vector3(0.0, 0.0, -0.025 * j)), "uvwabc");
    }
    for (const double y : {-0.1, 0.0, 0.1})
      tee.model.fix(tee.node(Vector3(0.0, y, 0.0)), "uvwabc");
    for (const double y : {-0.1, 0.0})
      tee.model.add_edge_force(tee.node(Vector3(1.0, y, 0.0)), tee.node(Vector3(1.0, y + 0.1, 0.0)),
                               Vector3(0.0, 0.0, -500.0));
    tee.model.solve();
    return -tee.model.motion(tee.node(Vector3(1.0, 0.0, 0.0)), 2);
  };
  const std::array<double, 3> members = {6.3890e-4, 6.4019e-4, 6.4008e-4};
  const std::array<double, 3> shells = {6.372e-4, 6.422e-4, 6.436e-4};
  for (std::size_t i = 0; i < 3; ++i)
  {
    const Index n = Index{5} << i;
    CAPTURE(n);
    const std::string cells = std::to_string(n) + " along";
    CHECK(std::abs(record({"C7.4 tee, shell and member, " + cells, "independent trial (computed)",
                           "deflection [m]", members[i], tip(n, true),
                           ToleranceClass::discretisation})) < 0.003);
    CHECK(std::abs(record({"C7.4 tee, all shells, " + cells, "independent trial (computed)",
                           "deflection [m]", shells[i], tip(n, false),
                           ToleranceClass::discretisation})) < 0.001);
  }
  CHECK(tip(20, true) == Approx(tip(20, false)).epsilon(0.01));
}
