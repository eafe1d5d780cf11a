#include "carlin/core/error.hpp"
#include "carlin/element/shell.hpp"

#include <Eigen/Eigenvalues>
#include <Eigen/Geometry>
#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <vector>

using namespace carlin;
using Catch::Matchers::Contains;

namespace
{
const QuadPoints flat = {Vector3(0.0, 0.0, 0.0), Vector3(1.1, 0.1, 0.0), Vector3(1.2, 0.9, 0.0),
                         Vector3(-0.1, 1.0, 0.0)};
/// C1.5: one corner lifted by a tenth of the side.
const QuadPoints warped = {Vector3(0.0, 0.0, 0.0), Vector3(1.1, 0.1, 0.0), Vector3(1.2, 0.9, 0.1),
                           Vector3(-0.1, 1.0, 0.0)};
const QuadPoints triangle = {Vector3(0.0, 0.0, 0.0), Vector3(1.1, 0.1, 0.2), Vector3(0.3, 0.9, 0.1),
                             Vector3(0.3, 0.9, 0.1)};

ShellSection steel(double thickness) // reference at mid-thickness
{
  return isotropic_shell_section(210e9, 0.3, 7850.0, 12e-6, thickness, 0.0);
}

/// Orthotropic, unsymmetric: what a laminate may be.
ShellSection laminate()
{
  ShellSection section = steel(0.01);
  section.A << 3.0e9, 0.4e9, 0.1e9, 0.4e9, 1.0e9, 0.05e9, 0.1e9, 0.05e9, 0.6e9;
  section.B << 2.0e6, 0.1e6, 0.0, 0.1e6, -1.0e6, 0.2e6, 0.0, 0.2e6, 0.1e6;
  section.D << 3.0e4, 0.5e4, 0.1e4, 0.5e4, 1.0e4, 0.0, 0.1e4, 0.0, 0.7e4;
  section.shear << 4.0e8, 0.5e8, 0.5e8, 2.0e8;
  section.drilling_modulus = 0.6e9;
  return section;
}

/// Columns: three translations and three rotations about the origin, at the four nodes.
Eigen::Matrix<double, 24, 6> rigid_motions(const QuadPoints& points)
{
  Eigen::Matrix<double, 24, 6> motions = Eigen::Matrix<double, 24, 6>::Zero();
  for (Index i = 0; i < 4; ++i)
    for (Index axis = 0; axis < 3; ++axis)
    {
      motions(6 * i + axis, axis) = 1.0;
      motions.block<3, 1>(6 * i, 3 + axis) =
          Vector3::Unit(axis).cross(points[static_cast<std::size_t>(i)]);
      motions(6 * i + 3 + axis, 3 + axis) = 1.0;
    }
  return motions;
}

Eigen::VectorXd eigenvalues(const Eigen::MatrixXd& matrix)
{
  return Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd>(matrix, Eigen::EigenvaluesOnly)
      .eigenvalues();
}

const Vector3 axis_x = Vector3::UnitX();
} // namespace

TEST_CASE("A shell has exactly six motions without energy: flat, warped, thin, triangle, laminate",
          "[unit][shell]")
{
  struct Sample
  {
    QuadPoints points;
    ShellSection section;
    Index size;
  };
  for (const Sample& sample : {Sample{flat, steel(0.01), 24}, Sample{warped, steel(0.01), 24},
                               Sample{flat, steel(1e-4), 24}, Sample{warped, steel(1e-4), 24},
                               Sample{triangle, steel(0.01), 18}, Sample{triangle, steel(1e-4), 18},
                               Sample{warped, laminate(), 24}, Sample{triangle, laminate(), 18}})
  {
    const Matrix24 K = shell_stiffness(sample.points, sample.section, axis_x);
    CHECK(K == K.transpose());
    CHECK(K.bottomRows(24 - sample.size).cwiseAbs().sum() == 0.0);
    const Eigen::VectorXd values = eigenvalues(K.topLeftCorner(sample.size, sample.size));
    const double largest = values(values.size() - 1);
    CHECK(values.head<6>().cwiseAbs().maxCoeff() < 1e-14 * largest);
    CHECK(values(6) > 1e-11 * largest); // t / a = 1e-4: 2e-10 (C1.5)
    const Eigen::MatrixXd forces = K * rigid_motions(sample.points);
    CHECK(forces.cwiseAbs().maxCoeff() < 1e-13 * K.cwiseAbs().maxCoeff());
  }
}

TEST_CASE("The drilling tie leaves no motion nearly free", "[unit][shell]")
{
  // C1.5: the smallest elastic drilling eigenvalue exceeds 1e-6 of the smallest membrane one.
  ShellSection section = steel(0.01);
  const Matrix24 tied = shell_stiffness(flat, section, axis_x);
  section.drilling_modulus = 0.0;
  const Matrix24 untied = shell_stiffness(flat, section, axis_x);
  Eigen::MatrixXd in_plane(12, 12), membrane(8, 8);
  const std::array<Index, 3> component = {0, 1, 5};
  for (Index i = 0; i < 12; ++i)
    for (Index j = 0; j < 12; ++j)
    {
      const auto freedom = [&](Index k)
      { return 6 * (k / 3) + component[static_cast<std::size_t>(k % 3)]; };
      in_plane(i, j) = tied(freedom(i), freedom(j));
    }
  for (Index i = 0; i < 8; ++i)
    for (Index j = 0; j < 8; ++j)
      membrane(i, j) = untied(6 * (i / 2) + i % 2, 6 * (j / 2) + j % 2);
  CHECK(eigenvalues(in_plane)(3) > 1e-6 * eigenvalues(membrane)(3));
}

TEST_CASE("The stiffness does not depend on the corner it starts from nor on the side seen",
          "[unit][shell]")
{
  // C1.6: 1e-12; A, B and D of the plate do not change when its normal is reversed.
  const ShellSection section = steel(0.01);
  for (const QuadPoints& points : {flat, warped})
  {
    const Matrix24 K = shell_stiffness(points, section, axis_x);
    const std::array<std::array<std::size_t, 4>, 4> orders = {
        {{1, 2, 3, 0}, {2, 3, 0, 1}, {3, 0, 1, 2}, {3, 2, 1, 0}}};
    for (const auto& order : orders)
    {
      const Matrix24 turned =
          shell_stiffness({points[order[0]], points[order[1]], points[order[2]], points[order[3]]},
                          section, axis_x);
      Matrix24 back;
      for (Index i = 0; i < 4; ++i)
        for (Index j = 0; j < 4; ++j)
          back.block<6, 6>(6 * static_cast<Index>(order[static_cast<std::size_t>(i)]),
                           6 * static_cast<Index>(order[static_cast<std::size_t>(j)])) =
              turned.block<6, 6>(6 * i, 6 * j);
      CHECK((back - K).cwiseAbs().maxCoeff() < 1e-12 * K.cwiseAbs().maxCoeff());
    }
  }
}

TEST_CASE("A triangle may start from any corner", "[unit][shell]")
{
  const ShellSection section = steel(0.01);
  const Matrix24 K = shell_stiffness(triangle, section, axis_x);
  const Matrix24 turned =
      shell_stiffness({triangle[1], triangle[2], triangle[0], triangle[0]}, section, axis_x);
  for (Index i = 0; i < 3; ++i)
    for (Index j = 0; j < 3; ++j)
      CHECK((turned.block<6, 6>(6 * i, 6 * j) - K.block<6, 6>(6 * ((i + 1) % 3), 6 * ((j + 1) % 3)))
                .cwiseAbs()
                .maxCoeff() < 1e-12 * K.cwiseAbs().maxCoeff());
}

TEST_CASE("Stiffness, mass and loads turn with the model", "[unit][shell]")
{
  const Matrix3 turn =
      Eigen::AngleAxisd(0.83, Vector3(0.3, -0.7, 0.64).normalized()).toRotationMatrix();
  for (const QuadPoints& points : {warped, triangle})
  {
    QuadPoints moved;
    for (std::size_t i = 0; i < 4; ++i)
      moved[i] = turn * points[i] + Vector3(10.0, -20.0, 30.0);
    Matrix24 blocks = Matrix24::Zero();
    for (Index i = 0; i < 8; ++i)
      blocks.block<3, 3>(3 * i, 3 * i) = turn;
    const ShellSection section = laminate();
    const auto compare = [&](const Eigen::MatrixXd& first, const Eigen::MatrixXd& second)
    { CHECK((first - second).cwiseAbs().maxCoeff() < 1e-12 * first.cwiseAbs().maxCoeff()); };
    compare(blocks * shell_stiffness(points, section, axis_x) * blocks.transpose(),
            shell_stiffness(moved, section, turn * axis_x));
    compare(blocks * shell_mass(points, section) * blocks.transpose(), shell_mass(moved, section));
    compare(blocks * shell_pressure(points, 3.0), shell_pressure(moved, 3.0));
    compare(blocks * shell_thermal(points, steel(0.01), axis_x, 5.0),
            shell_thermal(moved, steel(0.01), turn * axis_x, 5.0));
  }
}

TEST_CASE("The mass of a shell is exact for every rigid motion", "[unit][shell]")
{
  // A box a x b x t with its middle at (x, y, e): closed form about the origin.
  const double a = 1.2, b = 0.7, t = 0.05, e = 0.02, x = 0.6, y = 0.35;
  const ShellSection section = isotropic_shell_section(70e9, 0.3, 2700.0, 0.0, t, e);
  const double m = 2700.0 * a * b * t;
  Matrix6 exact = Matrix6::Zero();
  exact.diagonal() << m, m, m, m * (b * b / 12.0 + t * t / 12.0 + y * y + e * e),
      m * (a * a / 12.0 + t * t / 12.0 + x * x + e * e),
      m * ((a * a + b * b) / 12.0 + x * x + y * y);
  const Vector3 c(x, y, e);
  for (Index axis = 0; axis < 3; ++axis)
  {
    exact.block<3, 1>(0, 3 + axis) = m * Vector3::Unit(axis).cross(c);
    exact.block<1, 3>(3 + axis, 0) = exact.block<3, 1>(0, 3 + axis).transpose();
    for (Index other = 0; other < 3; ++other)
      if (other != axis)
        exact(3 + axis, 3 + other) = -m * c(axis) * c(other);
  }
  const QuadPoints whole = {Vector3(0.0, 0.0, 0.0), Vector3(a, 0.0, 0.0), Vector3(a, b, 0.0),
                            Vector3(0.0, b, 0.0)};
  const Matrix6 quad =
      rigid_motions(whole).transpose() * shell_mass(whole, section) * rigid_motions(whole);
  CHECK((quad - exact).cwiseAbs().maxCoeff() < 1e-13 * exact.cwiseAbs().maxCoeff());

  const QuadPoints lower = {whole[0], whole[1], whole[2], whole[2]};
  const QuadPoints upper = {whole[0], whole[2], whole[3], whole[3]};
  const Matrix6 halves =
      rigid_motions(lower).transpose() * shell_mass(lower, section) * rigid_motions(lower) +
      rigid_motions(upper).transpose() * shell_mass(upper, section) * rigid_motions(upper);
  CHECK((halves - exact).cwiseAbs().maxCoeff() < 1e-13 * exact.cwiseAbs().maxCoeff());
  CHECK(eigenvalues(shell_mass(warped, section))(0) > -1e-12 * m);
}

TEST_CASE("Uniform pressure on a closed surface has no resultant, also where cells are warped",
          "[unit][shell]")
{
  // A cube with its corners moved, outward normals; one face as two triangles.
  std::array<Vector3, 8> corner;
  for (std::size_t i = 0; i < 8; ++i)
    corner[i] = Vector3(i & 1U ? 1.0 : 0.0, i & 2U ? 1.0 : 0.0, i & 4U ? 1.0 : 0.0) +
                0.1 * Vector3(std::sin(3.0 * static_cast<double>(i)),
                              std::cos(5.0 * static_cast<double>(i)),
                              std::sin(7.0 * static_cast<double>(i) + 1.0));
  const std::vector<std::array<std::size_t, 4>> faces = {{0, 2, 3, 1}, {4, 5, 7, 6}, {0, 1, 5, 4},
                                                         {2, 6, 7, 3}, {0, 4, 6, 2}, {1, 3, 7, 5}};
  Vector3 force = Vector3::Zero(), moment = Vector3::Zero();
  double size = 0.0;
  for (const auto& face : faces)
  {
    const QuadPoints points = {corner[face[0]], corner[face[1]], corner[face[2]], corner[face[3]]};
    const Vector24 loads = shell_pressure(points, 2.0);
    for (Index i = 0; i < 4; ++i)
    {
      force += loads.segment<3>(6 * i);
      moment += points[static_cast<std::size_t>(i)].cross(loads.segment<3>(6 * i)) +
                loads.segment<3>(6 * i + 3);
      size += loads.segment<3>(6 * i).norm();
    }
  }
  CHECK(force.norm() < 1e-14 * size);
  CHECK(moment.norm() < 1e-14 * size);
}

TEST_CASE("Pressure pushes along the normal with pressure times area", "[unit][shell]")
{
  const Vector24 quad = shell_pressure(flat, 100.0);
  const Vector24 tri = shell_pressure(triangle, 100.0);
  Vector3 total = Vector3::Zero(), total_tri = Vector3::Zero();
  for (Index i = 0; i < 4; ++i)
  {
    total += quad.segment<3>(6 * i);
    total_tri += tri.segment<3>(6 * i);
  }
  CHECK(total.z() == Approx(100.0 * shell_area(flat)).epsilon(1e-14));
  CHECK(total_tri.norm() == Approx(100.0 * shell_area(triangle)).epsilon(1e-14));
  CHECK(total_tri.dot(shell_frame(triangle, axis_x).col(2)) > 0.0);
}

TEST_CASE("The stiffness is the energy of the strains that are reported", "[unit][shell]")
{
  // u K u = integral of strain . resultants, plus the drilling ties (switched off here); the
  // integration places are those of the element.
  ShellSection section = laminate();
  section.drilling_modulus = 0.0;
  Vector24 u;
  for (Index i = 0; i < 24; ++i)
    u(i) = std::sin(1.7 * static_cast<double>(i) + 0.3);
  const Matrix24 K = shell_stiffness(warped, section, axis_x);
  const Matrix3 frame = shell_frame(warped, axis_x);
  const double g = std::sqrt(1.0 / 3.0);
  double energy = 0.0;
  for (const double xi : {-g, g})
    for (const double eta : {-g, g})
    {
      const ShellState state = shell_state(warped, section, axis_x, u, xi, eta, 0.0);
      Eigen::Matrix2d jacobian = Eigen::Matrix2d::Zero();
      const std::array<double, 4> sx = {-1.0, 1.0, 1.0, -1.0}, sy = {-1.0, -1.0, 1.0, 1.0};
      for (std::size_t i = 0; i < 4; ++i)
      {
        const Vector2 place = (frame.transpose() * warped[i]).head<2>();
        jacobian.row(0) += 0.25 * sx[i] * (1.0 + sy[i] * eta) * place.transpose();
        jacobian.row(1) += 0.25 * sy[i] * (1.0 + sx[i] * xi) * place.transpose();
      }
      energy += jacobian.determinant() *
                (state.membrane.dot(state.force) + state.curvature.dot(state.moment) +
                 state.shear.dot(state.shear_force));
    }
  CHECK(energy == Approx(u.dot(K * u)).epsilon(1e-12));
}

TEST_CASE("Free growth of a warped cell makes strain and no force", "[unit][shell]")
{
  const ShellSection section = isotropic_shell_section(70e9, 0.33, 2700.0, 23e-6, 0.008, 0.004);
  for (const QuadPoints& points : {warped, triangle})
  {
    Vector24 growth = Vector24::Zero();
    for (Index i = 0; i < 4; ++i)
      growth.segment<3>(6 * i) = 23e-6 * 60.0 * points[static_cast<std::size_t>(i)];
    const ShellState state = shell_state(points, section, axis_x, growth, 0.3, -0.7, 60.0);
    const double held = 60.0 * section.thermal_force.x();
    CHECK(state.membrane.x() == Approx(23e-6 * 60.0).epsilon(1e-12));
    CHECK(state.force.norm() < 1e-12 * held);
    CHECK(state.moment.norm() < 1e-12 * held * 0.004);
    const Vector24 balance = shell_stiffness(points, section, axis_x) * growth -
                             shell_thermal(points, section, axis_x, 60.0);
    CHECK(balance.cwiseAbs().maxCoeff() < 1e-12 * held);
  }
}

TEST_CASE("The material axis turns an orthotropic section", "[unit][shell]")
{
  const QuadPoints square = {Vector3(0.0, 0.0, 0.0), Vector3(1.0, 0.0, 0.0), Vector3(1.0, 1.0, 0.0),
                             Vector3(0.0, 1.0, 0.0)};
  Vector24 stretch = Vector24::Zero();
  for (Index i = 0; i < 4; ++i)
    stretch(6 * i) = 1e-3 * square[static_cast<std::size_t>(i)].x();
  const ShellSection section = laminate();
  const ShellState along = shell_state(square, section, axis_x, stretch, 0.0, 0.0, 0.0);
  const ShellState across = shell_state(square, section, Vector3(0.0, 1.0, 0.5), stretch, 0.0, 0.0,
                                        0.0); // projected on the plane
  CHECK(along.membrane.x() == Approx(1e-3).epsilon(1e-12));
  CHECK(across.membrane.y() == Approx(1e-3).epsilon(1e-12));
  CHECK(along.force.x() == Approx(section.A(0, 0) * 1e-3).epsilon(1e-12));
  CHECK(across.force.y() == Approx(section.A(1, 1) * 1e-3).epsilon(1e-12));
}

TEST_CASE("Cells that are no shell are refused with their corners", "[unit][shell]")
{
  const ShellSection section = steel(0.01);
  const QuadPoints line = {Vector3(0.0, 0.0, 0.0), Vector3(1.0, 0.0, 0.0), Vector3(2.0, 0.0, 0.0),
                           Vector3(3.0, 0.0, 0.0)};
  CHECK_THROWS_WITH(shell_stiffness(line, section, axis_x),
                    Contains("(3, 0, 0)") && Contains("enclose no area"));
  const QuadPoints folded = {Vector3(0.0, 0.0, 0.0), Vector3(1.0, 0.0, 0.0), Vector3(0.1, 0.1, 0.0),
                             Vector3(0.0, 1.0, 0.0)};
  CHECK_THROWS_WITH(shell_stiffness(folded, section, axis_x), Contains("re-entrant"));
  CHECK_THROWS_WITH(shell_stiffness(flat, section, Vector3::UnitZ()),
                    Contains("material axis is normal"));
}
