// Curved and warped shells and slender strips, by elements alone. Values and tolerances of the
// verification book, group C; unit systems of the sources. Letters of fix(): u v w translations,
// a b c rotations about x y z.
#include "element_model.hpp"
#include "verification_record.hpp"

#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>
#include <string>

using namespace carlin;
using namespace carlin::testing;

namespace
{
constexpr double pi = std::numbers::pi;

double degrees(double angle) { return angle * pi / 180.0; }

std::string mesh(const char* subject, Index n1, Index n2)
{
  return std::string(subject) + ", " + std::to_string(n1) + " x " + std::to_string(n2);
}

/// Spreads a force uniformly over the edge i = n1 of a grid.
void load_tip(ElementModel& model, const Grid& grid, const Vector3& force)
{
  for (Index j = 0; j < grid.n2; ++j)
    model.add_edge_force(grid.node(grid.n1, j), grid.node(grid.n1, j + 1),
                         force / static_cast<double>(grid.n2));
}

void clamp_root(ElementModel& model, const Grid& grid)
{
  for (Index j = 0; j <= grid.n2; ++j)
    model.fix(grid.node(0, j), "uvwabc");
}

enum class Cells
{
  rectangles,
  trapezoids,
  parallelograms
};

/// Straight cantilever of the 1985 set: mean tip displacement along the force.
double straight_cantilever(Index n1, Index n2, Cells cells, const Vector3& force)
{
  ElementModel model;
  const Grid grid = add_grid(model, n1, n2, plate(1e7, 0.3, 0.1),
                             [&](double s, double t)
                             {
                               const double y = 0.2 * t - 0.1;
                               double x = 6.0 * s;
                               const Index i =
                                   static_cast<Index>(std::lround(s * static_cast<double>(n1)));
                               if (i > 0 && i < n1 && cells == Cells::trapezoids)
                                 x += i % 2 == 0 ? y : -y;
                               if (i > 0 && i < n1 && cells == Cells::parallelograms)
                                 x += y;
                               return Vector3(x, y, 0.0);
                             });
  clamp_root(model, grid);
  load_tip(model, grid, force);
  model.solve();
  double mean = 0.0;
  for (Index j = 0; j <= n2; ++j)
    mean += model.motion(grid.node(n1, j)).head<3>().dot(force.normalized());
  return mean / static_cast<double>(n2 + 1);
}

/// Twisted beam of the 1985 set: displacement of the tip centre along the force.
double twisted_beam(Index n1, Index n2, double thickness, const Vector3& force)
{
  ElementModel model;
  model.material_axis = Vector3(1.0, 0.0, 0.0);
  const Grid grid = add_grid(model, n1, n2, plate(29e6, 0.22, thickness),
                             [](double s, double t)
                             {
                               const double across = 1.1 * (t - 0.5);
                               return Vector3(12.0 * s, across * std::cos(0.5 * pi * s),
                                              across * std::sin(0.5 * pi * s));
                             });
  clamp_root(model, grid);
  load_tip(model, grid, force);
  model.solve();
  return model.motion(grid.node(n1, n2 / 2)).head<3>().dot(force.normalized());
}

double curved_cantilever(Index n1, Index n2, const Vector3& force)
{
  ElementModel model;
  const Grid grid =
      add_grid(model, n1, n2, plate(1e7, 0.25, 0.1),
               [](double s, double t)
               {
                 const double r = 4.12 + 0.2 * t;
                 return Vector3(r * std::sin(0.5 * pi * s), r * std::cos(0.5 * pi * s), 0.0);
               });
  clamp_root(model, grid);
  load_tip(model, grid, force);
  model.solve();
  double mean = 0.0;
  for (Index j = 0; j <= n2; ++j)
    mean += model.motion(grid.node(n1, j)).head<3>().dot(force.normalized());
  return mean / static_cast<double>(n2 + 1);
}

double roof(Index n)
{
  ElementModel model;
  const Grid grid = add_grid(model, n, n, plate(4.32e8, 0.0, 0.25),
                             [](double s, double t)
                             {
                               return Vector3(25.0 * s, 25.0 * std::sin(degrees(40.0) * t),
                                              25.0 * std::cos(degrees(40.0) * t));
                             });
  for (Index j = 0; j <= n; ++j)
  {
    model.fix(grid.node(n, j), "vw");
    model.fix(grid.node(0, j), "ubc");
    model.fix(grid.node(j, 0), "vac");
  }
  model.add_surface_load(Vector3(0.0, 0.0, -90.0));
  model.solve();
  return -model.motion(grid.node(0, n), 2);
}

double hemisphere_with_hole(Index n)
{
  ElementModel model;
  model.material_axis = Vector3(0.31, 0.53, 0.79); // normal to no cell of this mesh
  const Grid grid = add_grid(model, n, n, plate(6.825e7, 0.3, 0.04),
                             [](double s, double t)
                             {
                               const double a = degrees(90.0) * s;
                               const double e = degrees(72.0) * t;
                               return Vector3(10.0 * std::cos(a) * std::cos(e),
                                              10.0 * std::sin(a) * std::cos(e), 10.0 * std::sin(e));
                             });
  for (Index j = 0; j <= n; ++j)
  {
    model.fix(grid.node(0, j), "vac");
    model.fix(grid.node(n, j), "ubc");
  }
  model.fix(grid.node(0, 0), "w");
  model.add_force(grid.node(0, 0), 0, 1.0);
  model.add_force(grid.node(n, 0), 1, -1.0);
  model.solve();
  CHECK(model.motion(grid.node(0, 0), 0) ==
        Approx(-model.motion(grid.node(n, 0), 1)).epsilon(1e-6)); // symmetry of the problem
  return model.motion(grid.node(0, 0), 0);
}

double pinched_cylinder(Index n)
{
  ElementModel model;
  const Grid grid = add_grid(model, n, n, plate(3e6, 0.3, 3.0),
                             [](double s, double t)
                             {
                               return Vector3(300.0 * s, 300.0 * std::sin(degrees(90.0) * t),
                                              300.0 * std::cos(degrees(90.0) * t));
                             });
  for (Index j = 0; j <= n; ++j)
  {
    model.fix(grid.node(n, j), "vw");
    model.fix(grid.node(0, j), "ubc");
    model.fix(grid.node(j, 0), "vac");
    model.fix(grid.node(j, n), "wab");
  }
  model.add_force(grid.node(0, 0), 2, -0.25);
  model.solve();
  return -model.motion(grid.node(0, 0), 2);
}

/// Deflection of the free corner line's middle and strain energy of the whole.
std::array<double, 2> hyperbolic_paraboloid(Index n, double thickness)
{
  ElementModel model;
  const Grid grid = add_grid(model, n, n / 2, plate(2e11, 0.3, thickness),
                             [](double s, double t)
                             {
                               const double x = s - 0.5;
                               const double y = 0.5 * t;
                               return Vector3(x, y, x * x - y * y);
                             });
  for (Index j = 0; j <= grid.n2; ++j)
    model.fix(grid.node(0, j), "uvwabc");
  for (Index i = 0; i <= n; ++i)
    model.fix(grid.node(i, 0), "vac");
  model.add_surface_load(Vector3(0.0, 0.0, -8000.0 * thickness));
  model.solve();
  return {-model.motion(grid.node(n, 0), 2), 2.0 * model.work()};
}

double cook(Index n)
{
  ElementModel model;
  const Grid grid = add_grid(model, n, n, plate(1.0, 1.0 / 3.0, 1.0),
                             [](double s, double t)
                             { return Vector3(48.0 * s, 44.0 * s + t * (44.0 - 28.0 * s), 0.0); });
  for (Index i = 0; i <= n; ++i)
    for (Index j = 0; j <= n; ++j)
      model.fix(grid.node(i, j), i == 0 ? "uvwabc" : "wab");
  load_tip(model, grid, Vector3(0.0, 1.0, 0.0));
  model.solve();
  return model.motion(grid.node(n, n / 2), 1);
}
} // namespace

TEST_CASE("A slender strip bends in plane with one rectangle across", "[verification][shell]")
{
  // C2.1, 6 x 1: beam theory F L^3 / 3 EI + F L / kappa G A = 0.108094 (computed; MacNeal & Harder
  // 1985 print 0.1081). The element was measured at 0.991 for rectangles and 0.631 for
  // parallelograms by an independent trial (column M); trapezoids cannot bend (MacNeal 1987).
  const Vector3 in_plane(0.0, 1.0, 0.0);
  const double theory = 0.108094;
  const auto ratio = [&](const char* name, Cells cells)
  {
    return 1.0 + record({std::string("C2.1 straight strip in plane, 6 x 1 ") + name,
                         "beam theory (computed); MacNeal & Harder 1985 print 0.1081",
                         "tip displacement [-]", theory, straight_cantilever(6, 1, cells, in_plane),
                         ToleranceClass::discretisation});
  };
  CHECK(ratio("rectangles", Cells::rectangles) == Approx(0.991).margin(0.002));
  CHECK(ratio("parallelograms", Cells::parallelograms) == Approx(0.631).margin(0.005));
  CHECK(ratio("trapezoids", Cells::trapezoids) == Approx(0.051).margin(0.005));
  CHECK(straight_cantilever(24, 2, Cells::rectangles, in_plane) / theory > 0.97);
}

TEST_CASE("A slender strip bends out of plane whatever the shape of its cells",
          "[verification][shell]")
{
  // C2.1: 0.432094 by beam theory; within 5 % at 6 x 1.
  for (const Cells cells : {Cells::rectangles, Cells::trapezoids, Cells::parallelograms})
    CHECK(straight_cantilever(6, 1, cells, Vector3::UnitZ()) == Approx(0.432094).epsilon(0.05));
  record({"C2.1 straight strip out of plane, 6 x 1 rectangles",
          "beam theory (computed); MacNeal & Harder 1985 print 0.4321", "tip displacement [-]",
          0.432094, straight_cantilever(6, 1, Cells::rectangles, Vector3::UnitZ()),
          ToleranceClass::discretisation});
  CHECK(straight_cantilever(6, 1, Cells::rectangles, Vector3::UnitX()) ==
        Approx(3.0e-5).epsilon(0.01));
}

TEST_CASE("A curved strip bends in and out of its plane", "[verification][shell]")
{
  // C2.2: 0.088566 in plane (Golovin's exact solution; Timoshenko & Goodier, art. 33; the published
  // 0.08734 is 1.4 % low), 0.50056 out of plane (ring theory). Shells converge to 0.4985 there.
  const double in_plane =
      record({mesh("C2.2 curved strip in plane", 24, 4), "exact plane stress (Golovin)",
              "tip displacement [-]", 0.088566, curved_cantilever(24, 4, Vector3::UnitX()),
              ToleranceClass::discretisation});
  CHECK(std::abs(in_plane) < 0.01); // column M: 0.996
  CHECK(curved_cantilever(6, 1, Vector3::UnitX()) / 0.088566 == Approx(0.873).margin(0.005));
  const double out =
      record({mesh("C2.2 curved strip out of plane", 24, 4), "ring theory", "tip displacement [-]",
              0.50056, curved_cantilever(24, 4, Vector3::UnitZ()), ToleranceClass::discretisation});
  CHECK(std::abs(out) < 0.03);
}

TEST_CASE("A twisted beam meets the published displacements, thick and thin",
          "[verification][shell]")
{
  // C2.3. t 0.32: MacNeal & Harder 1985 (confirmed); t 0.05: Simo, Fox & Rifai 1989 (confirmed);
  // t 0.0032: Belytschko, Wong & Stolarski 1989 (memory; recomputed within 0.2 %).
  struct Row
  {
    double thickness, force, along_width, along_normal;
    const char* source;
  };
  const std::array<Row, 3> rows = {
      {{0.32, 1.0, 5.424e-3, 1.754e-3, "MacNeal & Harder 1985"},
       {0.05, 1.0, 1.390, 0.3431, "Simo, Fox & Rifai 1989"},
       {0.0032, 1e-6, 5.256e-3, 1.294e-3, "Belytschko, Wong & Stolarski 1989 (memory)"}}};
  for (const Row& row : rows)
  {
    CAPTURE(row.thickness);
    const auto error = [&](Index n1, Index n2, bool is_width)
    {
      return record({mesh("C2.3 twisted beam", n1, n2) + ", t " + std::to_string(row.thickness),
                     row.source,
                     is_width ? "tip displacement along the width [-]"
                              : "tip displacement along the normal [-]",
                     is_width ? row.along_width : row.along_normal,
                     twisted_beam(n1, n2, row.thickness,
                                  row.force * (is_width ? Vector3::UnitZ() : Vector3::UnitY())),
                     ToleranceClass::discretisation});
    };
    CHECK(std::abs(error(12, 2, true)) < 0.01);
    CHECK(std::abs(error(12, 2, false)) < 0.015);
    CHECK(std::abs(error(24, 4, true)) < 0.01);
    CHECK(std::abs(error(24, 4, false)) < 0.01);
  }
}

TEST_CASE("The barrel roof meets its shear-flexible limit", "[verification][shell]")
{
  // C4.1 (Scordelis & Lo 1964): 0.301463 computed (Reissner-Mindlin series and strips); the
  // published norm 0.3024 is not a limit. Tolerances of the book: 2.5, 0.6, 0.4 %.
  const auto error = [](Index n)
  {
    return record({mesh("C4.1 barrel roof", n, n), "Fourier series with strips (computed)",
                   "deflection of the free edge [-]", 0.301463, roof(n),
                   ToleranceClass::discretisation});
  };
  CHECK(std::abs(error(4)) < 0.06);
  CHECK(std::abs(error(8)) < 0.01);   // column M: 0.3039
  CHECK(std::abs(error(16)) < 0.002); // column M: 0.3017
  CHECK(std::abs(error(32)) < 0.001); // column M: 0.3014
}

TEST_CASE("The pinched hemisphere does not lock on coarse meshes", "[verification][shell]")
{
  // C4.2: 0.09353 computed (ring elements, harmonics). Tolerances of the book 2 % at 16, 0.7 % at
  // 32; this element's drilling tie gives 0.09260 already at 4 (column M), a usual one 0.0548.
  const auto error = [](Index n)
  {
    return record({mesh("C4.2 hemisphere with hole", n, n), "ring elements (computed)",
                   "displacement under the load [-]", 0.09353, hemisphere_with_hole(n),
                   ToleranceClass::discretisation});
  };
  CHECK(std::abs(error(4)) < 0.02);
  CHECK(std::abs(error(8)) < 0.01);
  CHECK(std::abs(error(16)) < 0.007);
  CHECK(std::abs(error(32)) < 0.003);
}

TEST_CASE("The pinched cylinder approaches the series from below", "[verification][shell]")
{
  // C4.4: 1.8277e-5 (Sanders series, computed; 1.8248e-5 Lindberg, Olson & Cowper 1969). 9 % at 16,
  // 2.5 % at 32. Column M: 1.375, 1.701, 1.805.
  const auto error = [](Index n)
  {
    return record({mesh("C4.4 pinched cylinder", n, n), "Sanders series (computed)",
                   "displacement under the load [-]", 1.8277e-5, pinched_cylinder(n),
                   ToleranceClass::discretisation});
  };
  CHECK(pinched_cylinder(8) == Approx(1.375e-5).epsilon(0.01));
  CHECK(std::abs(error(16)) < 0.09);
  CHECK(std::abs(error(32)) < 0.025);
}

TEST_CASE("The tapered membrane bends without drilling freedoms held", "[verification][shell]")
{
  // C4.7, B15 (Cook 1974): 23.9677 (p-version, computed). Book: 5, 1.5, 0.5 % at 4, 8, 16.
  const std::array<double, 4> tolerance = {0.14, 0.05, 0.015, 0.005};
  Index n = 2;
  for (const double limit : tolerance)
  {
    CAPTURE(n);
    const double error =
        record({mesh("C4.7 tapered membrane", n, n), "p-version (computed)",
                "displacement of mid-edge [-]", 23.9677, cook(n), ToleranceClass::discretisation});
    CHECK(std::abs(error) < limit);
    n *= 2;
  }
  const double order = std::log2((cook(8) - cook(4)) / (cook(16) - cook(8)));
  CHECK(order > 1.4); // the clamped corner is singular
  CHECK(order < 2.1);
}

TEST_CASE("The clamped hyperbolic paraboloid bends when it is thin", "[verification][shell]")
{
  // C4.8 (Bathe, Iosilevich & Chapelle 2000, table 2, confirmed). Column M at 8, 16, 32:
  // 0.945 0.975 0.991; 0.946 0.963 0.982; 0.463 0.925 0.978 of the published.
  struct Row
  {
    double thickness, deflection, energy;
    std::array<double, 3> ratio; // found by an independent trial of this element
  };
  const std::array<Row, 3> rows = {{{1e-2, 9.3355e-5, 1.6790e-3, {0.945, 0.975, 0.991}},
                                    {1e-3, 6.3941e-3, 1.1013e-2, {0.946, 0.963, 0.982}},
                                    {1e-4, 0.52988, 8.9867e-2, {0.463, 0.925, 0.978}}}};
  for (const Row& row : rows)
    for (std::size_t m = 0; m < 3; ++m)
    {
      const Index n = Index{8} << m;
      CAPTURE(row.thickness, n);
      const std::array<double, 2> result = hyperbolic_paraboloid(n, row.thickness);
      const double error = record(
          {mesh("C4.8 hyperbolic paraboloid", n, n / 2) + ", t/L " + std::to_string(row.thickness),
           "Bathe, Iosilevich & Chapelle 2000", "deflection [m]", row.deflection, result[0],
           ToleranceClass::discretisation});
      CHECK(1.0 + error > row.ratio[m] - 0.01);
      CHECK(1.0 + error < 1.01);
      CHECK(result[1] / row.energy == Approx(1.0 + error).margin(0.02));
    }
}
