#include "carlin/element/member.hpp"

#include <Eigen/Eigenvalues>
#include <Eigen/Geometry>
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>

using namespace carlin;
using Catch::Matchers::Contains;

namespace
{
MemberSection angle_section()
{
  return member_section(angle_constants(0.09, 0.006, 0.05, 0.01), 70e9, 0.33, 2700.0, 23e-6);
}

MemberGeometry inclined()
{
  return {Vector3(0.2, -0.1, 0.4), Vector3(1.3, 0.5, 0.9), Vector3(0.02, 0.03, 0.1),
          Vector3(-0.05, 0.04, 0.12), Vector3(0.1, 0.2, 1.0)};
}

Eigen::Matrix<double, 12, 6> rigid_motions(const MemberGeometry& geometry)
{
  Eigen::Matrix<double, 12, 6> motions = Eigen::Matrix<double, 12, 6>::Zero();
  const std::array<Vector3, 2> nodes = {geometry.node_1, geometry.node_2};
  for (Index i = 0; i < 2; ++i)
    for (Index axis = 0; axis < 3; ++axis)
    {
      motions(6 * i + axis, axis) = 1.0;
      motions.block<3, 1>(6 * i, 3 + axis) =
          Vector3::Unit(axis).cross(nodes[static_cast<std::size_t>(i)]);
      motions(6 * i + 3 + axis, 3 + axis) = 1.0;
    }
  return motions;
}

MemberGeometry turned(const MemberGeometry& geometry, const Matrix3& turn)
{
  return {turn * geometry.node_1, turn * geometry.node_2, turn * geometry.offset_1,
          turn * geometry.offset_2, turn * geometry.upright};
}

/// 12 x 12 with a 3 x 3 turn on its diagonal.
Matrix12 blocks(const Matrix3& turn)
{
  Matrix12 matrix = Matrix12::Zero();
  for (Index i = 0; i < 4; ++i)
    matrix.block<3, 3>(3 * i, 3 * i) = turn;
  return matrix;
}
} // namespace

TEST_CASE("A member has exactly six motions without energy", "[unit][member]")
{
  MemberSection rigid_in_shear = angle_section();
  rigid_in_shear.shear_stiffness_y = rigid_in_shear.shear_stiffness_z =
      std::numeric_limits<double>::infinity();
  for (const MemberSection& section : {angle_section(), rigid_in_shear})
  {
    const Matrix12 K = member_stiffness(inclined(), section);
    CHECK(K == K.transpose());
    const Eigen::VectorXd values =
        Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd>(K, Eigen::EigenvaluesOnly).eigenvalues();
    CHECK(values.head<6>().cwiseAbs().maxCoeff() < 1e-14 * values(11));
    CHECK(values(6) > 1e-8 * values(11));
    CHECK((K * rigid_motions(inclined())).cwiseAbs().maxCoeff() < 1e-13 * K.cwiseAbs().maxCoeff());
  }
}

TEST_CASE("Member stiffness, mass and loads turn with the model", "[unit][member]")
{
  const Matrix3 turn =
      Eigen::AngleAxisd(1.2, Vector3(0.5, 0.5, -0.7).normalized()).toRotationMatrix();
  const MemberSection section = angle_section();
  const MemberGeometry here = inclined();
  const MemberGeometry there = turned(here, turn);
  const auto compare = [](const Eigen::MatrixXd& first, const Eigen::MatrixXd& second)
  { CHECK((first - second).cwiseAbs().maxCoeff() < 1e-12 * first.cwiseAbs().maxCoeff()); };
  const Matrix12 T = blocks(turn);
  compare(T * member_stiffness(here, section) * T.transpose(), member_stiffness(there, section));
  compare(T * member_mass(here, section) * T.transpose(), member_mass(there, section));
  const Vector3 q(1.0, -2.0, 3.0);
  compare(T * member_line_load(here, section, q), member_line_load(there, section, turn * q));
  compare(T * member_thermal(here, section, 20.0), member_thermal(there, section, 20.0));
}

TEST_CASE("A member may run either way", "[unit][member]")
{
  // Reversed, its y axis points the other way: the profile is mirrored with it.
  MemberSection mirrored = angle_section();
  mirrored.bending_product *= -1.0;
  mirrored.profile.shear_centre_y *= -1.0;
  const MemberGeometry here = inclined();
  const MemberGeometry back = {here.node_2, here.node_1, here.offset_2, here.offset_1,
                               here.upright};
  Matrix12 swap = Matrix12::Zero();
  swap.topRightCorner<6, 6>().setIdentity();
  swap.bottomLeftCorner<6, 6>().setIdentity();
  const Matrix12 K = member_stiffness(here, angle_section());
  CHECK((swap * member_stiffness(back, mirrored) * swap.transpose() - K).cwiseAbs().maxCoeff() <
        1e-12 * K.cwiseAbs().maxCoeff());
}

TEST_CASE("The mass of a member is exact for every rigid motion", "[unit][member]")
{
  // A block 1.1 x 0.3 x 0.2 along x whose middle is at c: closed form about the origin.
  const double L = 1.1, width = 0.3, height = 0.2;
  const MemberSection section =
      member_section(flat_bar_constants(height, width), 70e9, 0.3, 2700.0, 0.0);
  const Vector3 arm(0.0, 0.05, -0.1);
  const MemberGeometry geometry = {Vector3::Zero(), Vector3(L, 0.0, 0.0), arm, arm,
                                   Vector3::UnitZ()};
  const double m = 2700.0 * L * width * height;
  const Vector3 c = arm + Vector3(0.5 * L, 0.0, 0.0);
  Matrix6 exact = Matrix6::Zero();
  exact.topLeftCorner<3, 3>() = m * Matrix3::Identity();
  exact.bottomRightCorner<3, 3>() = m * (c.squaredNorm() * Matrix3::Identity() - c * c.transpose());
  exact.diagonal().tail<3>() +=
      m / 12.0 *
      Vector3(width * width + height * height, L * L + height * height, L * L + width * width);
  for (Index axis = 0; axis < 3; ++axis)
  {
    exact.block<3, 1>(0, 3 + axis) = m * Vector3::Unit(axis).cross(c);
    exact.block<1, 3>(3 + axis, 0) = exact.block<3, 1>(0, 3 + axis).transpose();
  }
  const Matrix12 mass = member_mass(geometry, section);
  const Matrix6 found = rigid_motions(geometry).transpose() * mass * rigid_motions(geometry);
  CHECK((found - exact).cwiseAbs().maxCoeff() < 1e-13 * exact.cwiseAbs().maxCoeff());
  CHECK(mass == mass.transpose());
}

TEST_CASE("A line load balances and its section forces vary as statics says", "[unit][member]")
{
  const MemberSection section = angle_section();
  const MemberGeometry geometry = inclined();
  const MemberFrame frame = member_frame(geometry);
  const Vector3 q(10.0, -200.0, 300.0);
  const Vector12 loads = member_line_load(geometry, section, q);
  const Vector3 total = loads.segment<3>(0) + loads.segment<3>(6);
  CHECK((total - q * frame.length).norm() < 1e-12 * total.norm());
  const Vector3 middle =
      0.5 * (geometry.node_1 + geometry.offset_1 + geometry.node_2 + geometry.offset_2);
  const Vector3 moment = geometry.node_1.cross(loads.segment<3>(0)) + loads.segment<3>(3) +
                         geometry.node_2.cross(loads.segment<3>(6)) + loads.segment<3>(9);
  CHECK((moment - middle.cross(q * frame.length)).norm() < 1e-11 * moment.norm());

  // Held at node 1: forces at its end carry the whole load, none at the free end.
  const Matrix12 K = member_stiffness(geometry, section);
  Vector12 motion = Vector12::Zero();
  motion.tail<6>() = K.bottomRightCorner<6, 6>().llt().solve(loads.tail<6>());
  const MemberForces forces = member_forces(geometry, section, motion, loads);
  const Vector3 local = frame.axes.transpose() * q * frame.length;
  CHECK((forces.end_1.head<3>() - local).norm() < 1e-9 * local.norm());
  CHECK(forces.end_1(3) == Approx(0.0).margin(1e-9 * local.norm()));
  CHECK(forces.end_1(4) == Approx(-0.5 * frame.length * local.z()).epsilon(1e-9));
  CHECK(forces.end_1(5) == Approx(0.5 * frame.length * local.y()).epsilon(1e-9));
  CHECK(forces.end_2.norm() < 1e-9 * local.norm());
}

TEST_CASE("Halving a member changes nothing at its ends", "[unit][member]")
{
  // The stiffness is exact: two halves condensed at the middle are the whole.
  const MemberSection section = angle_section();
  const MemberGeometry whole = inclined();
  MemberGeometry first = whole, second = whole;
  first.node_2 = second.node_1 = 0.5 * (whole.node_1 + whole.node_2);
  first.offset_2 = second.offset_1 = 0.5 * (whole.offset_1 + whole.offset_2);
  const Matrix12 a = member_stiffness(first, section), b = member_stiffness(second, section);
  const Matrix6 middle = a.bottomRightCorner<6, 6>() + b.topLeftCorner<6, 6>();
  Matrix12 outer = Matrix12::Zero();
  outer.topLeftCorner<6, 6>() = a.topLeftCorner<6, 6>();
  outer.bottomRightCorner<6, 6>() = b.bottomRightCorner<6, 6>();
  Eigen::Matrix<double, 12, 6> link;
  link << a.topRightCorner<6, 6>(), b.bottomLeftCorner<6, 6>();
  outer -= link * middle.llt().solve(link.transpose());
  const Matrix12 K = member_stiffness(whole, section);
  CHECK((outer - K).cwiseAbs().maxCoeff() < 1e-10 * K.cwiseAbs().maxCoeff());
}

TEST_CASE("Stress in an unsymmetric section follows both moments", "[unit][member]")
{
  // Integrals of the stress over the angle's own two rectangles give the moments back.
  const MemberSection section = angle_section();
  Vector6 forces;
  forces << 5000.0, 0.0, 0.0, 0.0, 120.0, -70.0;
  struct Part
  {
    double y, z, width, height;
  };
  double axial = 0.0, moment_y = 0.0, moment_z = 0.0;
  for (const Part& part : {Part{0.0, 0.045, 0.006, 0.09}, Part{0.022, 0.095, 0.05, 0.01}})
    for (const double i : {-1.0, 1.0})
      for (const double j : {-1.0, 1.0})
      {
        const double g = 0.5 / std::sqrt(3.0);
        const double y = part.y + i * g * part.width - section.profile.centroid_y;
        const double z = part.z + j * g * part.height - section.profile.centroid_z;
        const double share = 0.25 * part.width * part.height;
        const double stress = member_stress(section, forces, Vector2(y, z));
        axial += share * stress;
        moment_y += share * z * stress;
        moment_z -= share * y * stress;
      }
  CHECK(axial == Approx(5000.0).epsilon(1e-12));
  CHECK(moment_y == Approx(120.0).epsilon(1e-12));
  CHECK(moment_z == Approx(-70.0).epsilon(1e-12));
}

TEST_CASE("Members that cannot stand are refused by what is wrong", "[unit][member]")
{
  const MemberGeometry sound = inclined();
  MemberGeometry geometry = sound;
  geometry.node_2 = geometry.node_1 + geometry.offset_1 - geometry.offset_2;
  CHECK_THROWS_WITH(member_stiffness(geometry, angle_section()), Contains("coincide"));
  geometry = sound;
  geometry.upright = member_frame(sound).axes.col(0);
  CHECK_THROWS_WITH(member_stiffness(geometry, angle_section()),
                    Contains("upright") && Contains("runs along the member"));
  MemberSection section = angle_section();
  section.torsional_stiffness = 0.0;
  CHECK_THROWS_WITH(member_stiffness(sound, section), Contains("torsional_stiffness is 0"));
  section = angle_section();
  section.shear_stiffness_z = 0.0;
  CHECK_THROWS_WITH(member_stiffness(sound, section), Contains("shear_stiffness_z is 0"));
  section = angle_section();
  section.bending_product = 1e9;
  CHECK_THROWS_WITH(member_stiffness(sound, section), Contains("bending_product"));
}
