// A box hull in torsion through the chain: open above (restrained warping) and decked (Bredt).
// Sources: Vlasov, Thin-walled Elastic Beams (1961), ch. II, completed here by the warping shear;
// Bredt; Benscoter, A Theory of Torsion Bending for Multicell Beams (J. Appl. Mech. 1954). All
// recalled and derived again beside the code; the sectorial integration is checked on the U of H3
// and H5 of the verification book.

#include "chain.hpp"
#include "verification_record.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <filesystem>
#include <fstream>
#include <sstream>
#include <stdexcept>
#include <string>
#include <utility>
#include <vector>

using namespace carlin;
using namespace carlin::testing;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace
{
constexpr double modulus = 70e9;
constexpr double poisson = 0.33;
constexpr double thickness = 0.006;
constexpr double length = 9.0;
constexpr double breadth = 2.6;
constexpr double depth = 1.2;
constexpr double open_torque = 1000.0 * depth * breadth;          // 1 kN/m up and down the sides
constexpr double closed_torque = 10000.0 * 2.0 * breadth * depth; // flow 10 kN/m: q 2 A

double shear_modulus(double nu) { return modulus / (2.0 * (1.0 + nu)); }

/// Constants of an open section of straight walls, symmetric about z.
struct OpenSection
{
  double torsion_constant;       ///< J [m^4]
  double shear_centre;           ///< z of the shear centre [m]
  double warping_constant;       ///< I_w = int w^2 t ds [m^6]
  double second_moment;          ///< int y^2 t ds [m^4]
  double shear_energy;           ///< int S_w^2 / t ds [m^8]
  double shear_energy_sideways;  ///< int S_w S_y / t ds [m^7], S_y = int y t ds
  std::vector<double> sectorial; ///< w at the walls' ends [m^2]
};

/// Int from 0 to 1 of a polynomial up to the fifth degree (Gauss, 3 points).
template <class Function> double integral(const Function& f)
{
  const double a = 0.5 * std::sqrt(0.6);
  return (5.0 * f(0.5 - a) + 8.0 * f(0.5) + 5.0 * f(0.5 + a)) / 18.0;
}

/// Integrates w (linear along a wall), S_w and S_y (quadratic) wall by wall, without loss.
OpenSection open_section(const std::vector<Vector2>& corner, const std::vector<double>& wall)
{
  const auto along = [](double from, double to, double share)
  { return from + (to - from) * share; };
  const auto size = [&](std::size_t i) { return (corner[i + 1] - corner[i]).norm(); };
  const auto int_product = [&](const std::vector<double>& f, const std::vector<double>& g)
  {
    double sum = 0.0;
    for (std::size_t i = 0; i < wall.size(); ++i)
      sum +=
          wall[i] * size(i) *
          integral([&](double s) { return along(f[i], f[i + 1], s) * along(g[i], g[i + 1], s); });
    return sum;
  };

  OpenSection section = {};
  std::vector<double> y;
  std::vector<double> w = {0.0}; // about the origin: dw = y dz - z dy
  const std::vector<double> one(corner.size(), 1.0);
  for (const Vector2& place : corner)
    y.push_back(place.x());
  for (std::size_t i = 0; i < wall.size(); ++i)
  {
    w.push_back(w[i] + corner[i].x() * corner[i + 1].y() - corner[i + 1].x() * corner[i].y());
    section.torsion_constant += size(i) * std::pow(wall[i], 3) / 3.0;
  }
  // a pole at z_s adds z_s y to w; the shear centre is where int w y t ds = 0
  section.second_moment = int_product(y, y);
  section.shear_centre = -int_product(w, y) / section.second_moment;
  for (std::size_t i = 0; i < w.size(); ++i)
    w[i] += section.shear_centre * y[i];
  const double mean = int_product(w, one) / int_product(one, one);
  for (double& value : w)
    value -= mean;
  section.warping_constant = int_product(w, w);
  section.sectorial = w;

  double start_w = 0.0;
  double start_y = 0.0;
  for (std::size_t i = 0; i < wall.size(); ++i)
  {
    const auto moment = [&](double start, const std::vector<double>& f, double s)
    { return start + wall[i] * size(i) * s * (f[i] + 0.5 * (f[i + 1] - f[i]) * s); };
    const auto s_w = [&](double s) { return moment(start_w, w, s); };
    const auto s_y = [&](double s) { return moment(start_y, y, s); };
    section.shear_energy += size(i) / wall[i] * integral([&](double s) { return s_w(s) * s_w(s); });
    section.shear_energy_sideways +=
        size(i) / wall[i] * integral([&](double s) { return s_w(s) * s_y(s); });
    start_w = s_w(1.0);
    start_y = s_y(1.0);
  }
  return section;
}

OpenSection open_hull()
{
  return open_section(
      {{-breadth / 2, depth}, {-breadth / 2, 0}, {breadth / 2, 0}, {breadth / 2, depth}},
      {thickness, thickness, thickness});
}

/// Twist at the free end of a cantilever, warping held at the root.
///
/// With the twist rate f', the warping u = -c w and the stiffness S against their difference:
/// T = GJ f' + S (f' - c), E I_w c'' + S (f' - c) = 0, c(0) = 0, c'(L) = 0, m = S / (GJ + S),
/// k^2 = m GJ / (E I_w): f(L) = T L / GJ (1 - m tanh kL / kL). Open section: the flow of the
/// warping is -M S_w / I_w, by its energy S = G I_w^2 / int S_w^2 / t ds; m = 1 is Vlasov's. Closed
/// section: S = G (I_c - J), I_c = int p^2 t ds (Benscoter), where the part GJ is Bredt's.
double held_twist(double torque, double span, double torsion_stiffness, double warping_stiffness,
                  double share)
{
  const double kl = std::sqrt(share * torsion_stiffness / warping_stiffness) * span;
  return torque * span / torsion_stiffness * (1.0 - share * std::tanh(kl) / kl);
}

/// Share m of the open hull: S / (GJ + S); G falls out.
double warping_share(const OpenSection& section)
{
  const double stiffness = std::pow(section.warping_constant, 2) / section.shear_energy;
  return stiffness / (section.torsion_constant + stiffness);
}

double open_twist(double nu)
{
  const OpenSection section = open_hull();
  return held_twist(open_torque, length, shear_modulus(nu) * section.torsion_constant,
                    modulus * section.warping_constant, warping_share(section));
}

/// Bredt: J = 4 A^2 / int ds / t.
double closed_constant()
{
  return 2.0 * std::pow(breadth * depth, 2) * thickness / (breadth + depth);
}

double bredt_twist()
{
  return closed_torque * length / (shear_modulus(poisson) * closed_constant());
}

double benscoter_twist()
{
  const double polar = 0.5 * breadth * depth * thickness * (breadth + depth);
  const double corner = 0.25 * breadth * depth * (breadth - depth) / (breadth + depth); // w there
  const double warping = corner * corner * thickness * 2.0 * (breadth + depth) / 3.0;
  return held_twist(closed_torque, length, shear_modulus(poisson) * closed_constant(),
                    modulus * warping, 1.0 - closed_constant() / polar);
}

using Edits = std::vector<std::pair<std::string, std::string>>;

/// Runs a model file with every `first` replaced by its `second`; each must occur.
chain::Run run_edited(const std::string& name, const Edits& edits)
{
  const std::filesystem::path file =
      std::filesystem::path(CARLIN_SOURCE_DIR) / "tests/verification/models" / (name + ".yaml");
  std::ifstream stream(file);
  std::stringstream content;
  content << stream.rdbuf();
  std::string text = content.str();
  for (const auto& [from, to] : edits)
  {
    std::size_t place = text.find(from);
    if (place == std::string::npos)
      throw std::runtime_error(file.string() + " has no '" + from + "'");
    for (; place != std::string::npos; place = text.find(from, place + to.size()))
      text.replace(place, from.size(), to);
  }
  return chain::run_text(text);
}

/// Cells of half the size: 60 along, 16 across, 8 up.
Edits halved(Edits also = {})
{
  const Edits fine = {{"[30, 8]", "[60, 16]"},
                      {"[30, 4]", "[60, 8]"},
                      {"[8, 4]", "[16, 8]"},
                      {"divisions: 4", "divisions: 8"}};
  for (const auto& edit : fine)
    also.push_back(edit);
  return also;
}

Vector6 end(const chain::Run& run, const std::string& corner)
{
  return run.displacement("end-" + corner, "twisted");
}

/// Turn of the bottom's end about x.
double level_turn(const chain::Run& run)
{
  return (end(run, "chine-port")[2] - end(run, "chine-starboard")[2]) / breadth;
}

/// Turn of the sides' end about x.
double upright_turn(const chain::Run& run)
{
  return -(end(run, "top-port")[1] - end(run, "chine-port")[1]) / depth;
}

double closed_turn(const chain::Run& run) { return 0.5 * (level_turn(run) + upright_turn(run)); }

/// End twists of a model on the file's mesh (30 along, 8 across, 4 up) and on the halved one.
struct Pair
{
  double coarse;
  double fine;
};

/// One row of the verification table. @return The relative error.
double row(const char* subject, const char* source, const char* quantity, double exact,
           double computed)
{
  return record({.subject = subject,
                 .source = source,
                 .quantity = quantity,
                 .published = exact,
                 .computed = computed,
                 .tolerance = ToleranceClass::discretisation});
}

// The root of the closed hull let free to warp: three points stop turning about y and z.
const Edits warping_free = {
    {"hold: all}", "hold: [y, z]}\n    along: {points: [root-chine-starboard, root-chine-port, "
                   "root-top-port], hold: [x]}"}};
const Edits wires_across = {{"divisions: 8", "divisions: 16"}};
} // namespace

TEST_CASE("Sectorial integration gives the U of the verification book", "[verification][torsion]")
{
  // H3 and H5, printed to 9 or 10 digits: bottom 0.2 m x 4 mm, sides 0.1 m x 3 mm
  const OpenSection section =
      open_section({{-0.1, 0.1}, {-0.1, 0.0}, {0.1, 0.0}, {0.1, 0.1}}, {0.003, 0.004, 0.003});
  CHECK_THAT(section.torsion_constant, WithinRel(6.06666667e-9, 1e-9));
  CHECK_THAT(section.shear_centre, WithinRel(-0.0346153846, 2e-9));
  CHECK_THAT(section.warping_constant, WithinRel(9.61538462e-9, 1e-9));
  const double gj = 26.3157894737e9 * section.torsion_constant;
  const double eiw = 70e9 * section.warping_constant;
  CHECK_THAT(held_twist(100.0, 3.0, gj, eiw, 1.0), WithinRel(0.7243611357, 1e-9));
}

TEST_CASE("The open hull has the channel's shear centre and warping constant",
          "[verification][torsion]")
{
  // H3: e = 3 h^2 / (6 h + b), I_w = t h^3 b^2 / 12 (3 h + 2 b) / (6 h + b) for walls alike
  const double b = breadth;
  const double h = depth;
  const OpenSection section = open_hull();
  CHECK_THAT(section.shear_centre, WithinRel(-3.0 * h * h / (6.0 * h + b), 1e-12));
  CHECK_THAT(section.warping_constant, WithinRel(thickness * std::pow(h, 3) * b * b / 12.0 *
                                                     (3.0 * h + 2.0 * b) / (6.0 * h + b),
                                                 1e-12));
}

// L / b = 3.46, kL = 0.046: the hull resists by warping, its GJ carries less than 0.1 %.
// The theory has no Poisson's ratio: a built-in root also holds the walls' width. That is 0.5 % of
// the twist here (the next test, without it, comes to 0.07 %); cells of 0.15 m add 0.1 % (seen
// -0.73, -0.59, -0.54 % on 30, 60 and 120 cells along). Hence 1 %, a third of the warping shear.
TEST_CASE("An open hull with a built-in root twists as restrained warping with its shear says",
          "[verification][torsion]")
{
  const OpenSection section = open_hull();
  const chain::Run coarse = chain::run("open-hull");
  const chain::Run fine = run_edited("open-hull", halved());
  const double exact = open_twist(poisson);
  const char* source = "Vlasov 1961 with warping shear";
  const double coarse_error = row("open hull 9 x 2.6 x 1.2 m, root held, 30 x 8 x 4", source,
                                  "end twist [rad]", exact, level_turn(coarse));
  const double fine_error = row("open hull 9 x 2.6 x 1.2 m, root held, 60 x 16 x 8", source,
                                "end twist [rad]", exact, level_turn(fine));
  CAPTURE(exact, coarse_error, fine_error);
  CHECK(std::abs(fine_error) < 0.01);
  CHECK(std::abs(fine_error) < std::abs(coarse_error));
  CHECK_THAT(upright_turn(fine), WithinRel(level_turn(fine), 1e-3)); // the section keeps its shape

  // the shear counts: Vlasov's twist without it is 2.7 % smaller, and the hull's is above it
  const double gj = shear_modulus(poisson) * section.torsion_constant;
  const double without =
      held_twist(open_torque, length, gj, modulus * section.warping_constant, 1.0);
  CHECK_THAT(exact / without, WithinAbs(1.0275, 5e-4));
  CHECK(level_turn(fine) > 1.015 * without);

  // centre of turning: the shear centre, moved by the shear of warping working on a sideways force
  const double sideways = open_torque * length / shear_modulus(poisson) *
                          section.shear_energy_sideways /
                          (section.second_moment * section.warping_constant);
  const double bottom = sideways + exact * section.shear_centre;
  CHECK(std::abs(row("open hull 9 x 2.6 x 1.2 m, root held, 60 x 16 x 8", source,
                     "end of the bottom sideways [m]", bottom, end(fine, "chine-port")[1])) < 0.01);

  // the end is free to warp: u = -c w, c(L) = T / GJ (1 - 1 / cosh kL)
  const double kl =
      length * std::sqrt(warping_share(section) * gj / (modulus * section.warping_constant));
  const double rate = open_torque / gj * (1.0 - 1.0 / std::cosh(kl));
  CHECK_THAT(end(fine, "chine-port")[0], WithinRel(-rate * section.sectorial[2], 0.01));
  CHECK_THAT(end(fine, "top-port")[0], WithinRel(-rate * section.sectorial[3], 0.01));
}

TEST_CASE("Without Poisson's ratio the open hull comes closer to the theory",
          "[verification][torsion]")
{
  const Edits none = {{"poissons_ratio: 0.33", "poissons_ratio: 0"}};
  const double exact = open_twist(0.0);
  const double coarse = level_turn(run_edited("open-hull", none)) / exact - 1.0;
  const double fine =
      row("open hull, Poisson's ratio 0, root held, 60 x 16 x 8", "Vlasov 1961 with warping shear",
          "end twist [rad]", exact, level_turn(run_edited("open-hull", halved(none))));
  CAPTURE(exact, coarse, fine);
  CHECK(std::abs(fine) < 2e-3); // seen -0.13, -0.07, -0.05 % on 30, 60 and 120 cells along
  CHECK(std::abs(fine) < 0.75 * std::abs(coarse));
}

// The end's warping bends the transom and the corners it makes with the sides: with nothing held at
// the root that is 17 % of the hull's own GJ / L (seen), and with the root held GJ itself carries
// less than 0.1 % of the torque's work (2/5 (kL)^2).
TEST_CASE("The thin transom does not hold the open hull's warping", "[verification][torsion]")
{
  const Edits bare = {{"    transom: {corners: [end-chine-starboard, end-chine-port, end-top-port, "
                       "end-top-starboard], divisions: [8, 4], schedule: sheet}\n",
                       ""}};
  const double with = level_turn(chain::run("open-hull"));
  const double without = level_turn(run_edited("open-hull", bare));
  CHECK(with < without);
  CHECK_THAT(with, WithinRel(without, 1e-3)); // seen 0.04 %
}

// Free root: uniform torsion. The walls' own t^3 / 3 would add 0.002 %; tolerance 0.1 %.
// Held root: Benscoter's one warping shape is stiffer than walls that may choose theirs (it decays
// over 0.9 m, less than the walls are broad), Bredt's has no root at all; the hull lies between.
// The whole effect is 1.35 %, so 1.5 % from either; mesh 0.1 %.
TEST_CASE("A decked hull has Bredt's stiffness, with the root free and held",
          "[verification][torsion]")
{
  Edits fine_free = halved(warping_free);
  fine_free.insert(fine_free.end(), wires_across.begin(), wires_across.end());
  const Pair free = {closed_turn(run_edited("closed-hull", warping_free)),
                     closed_turn(run_edited("closed-hull", fine_free))};
  const Pair held = {closed_turn(chain::run("closed-hull")),
                     closed_turn(run_edited("closed-hull", halved(wires_across)))};
  const double bredt = bredt_twist();
  const double benscoter = benscoter_twist();
  CAPTURE(bredt, benscoter, free.coarse, free.fine, held.coarse, held.fine);

  CHECK(std::abs(row("decked hull 9 x 2.6 x 1.2 m, root free to warp, 60 x 16 x 8", "Bredt",
                     "end twist [rad]", bredt, free.fine)) < 1e-3);
  CHECK_THAT(free.coarse, WithinRel(free.fine, 1e-3));

  CHECK(std::abs(row("decked hull 9 x 2.6 x 1.2 m, root held, 60 x 16 x 8",
                     "Benscoter 1954 on Bredt", "end twist [rad]", benscoter, held.fine)) < 0.015);
  CHECK(held.fine > benscoter);
  CHECK(held.fine < bredt);
  CHECK_THAT(held.coarse, WithinRel(held.fine, 1e-3));

  // Decked to open, both with the root held: 61.0 (theory 61.9). By J alone, nothing held, it is
  // 85390: a report of such a ratio must say which. Each side is judged above by its own theory.
  const double open = level_turn(run_edited("open-hull", halved()));
  const double scale = closed_torque / open_torque;
  row("hull decked to open, both roots held, 60 x 16 x 8", "ratio of the two theories",
      "torsional stiffness ratio", scale * open_twist(poisson) / benscoter,
      scale * open / held.fine);
  CHECK_THAT(closed_constant() / open_hull().torsion_constant, WithinRel(85390.0, 1e-4));
}
