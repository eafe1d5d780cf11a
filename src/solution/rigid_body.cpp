#include "carlin/core/error.hpp"
#include "carlin/solution/hull_solver.hpp"

namespace carlin
{
RigidAcceleration rigid_acceleration(const MassProperties& body, const Vector3& force,
                                     const Vector3& moment_about_centre)
{
  if (!(body.mass > 0.0))
    throw SolveError("the craft has no mass; it cannot be balanced by its inertia");
  RigidAcceleration acceleration;
  acceleration.centre = body.centre;
  acceleration.linear = force / body.mass;
  // A straight structure of lines has no inertia about its axis: there the pseudo-inverse gives no
  // turning, and a moment about it stays at the pins, where the audit shows it.
  const Eigen::SelfAdjointEigenSolver<Matrix3> axes(body.inertia);
  const double largest = axes.eigenvalues()[2];
  const Vector3 components = axes.eigenvectors().transpose() * moment_about_centre;
  for (Index i = 0; i < 3; ++i)
    if (axes.eigenvalues()[i] > 1e-12 * largest)
      acceleration.angular += components[i] / axes.eigenvalues()[i] * axes.eigenvectors().col(i);
  return acceleration;
}

MassProperties combined(const std::vector<MassProperties>& bodies)
{
  MassProperties sum;
  for (const MassProperties& body : bodies)
  {
    sum.mass += body.mass;
    sum.centre += body.mass * body.centre;
  }
  if (sum.mass <= 0.0)
    return {};
  sum.centre /= sum.mass;
  for (const MassProperties& body : bodies)
  {
    const Vector3 d = body.centre - sum.centre;
    sum.inertia +=
        body.inertia + body.mass * (d.squaredNorm() * Matrix3::Identity() - d * d.transpose());
  }
  return sum;
}

VectorX inertia_forces(const Structure& structure, const RigidAcceleration& acceleration)
{
  VectorX field(structure.mass.rows());
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
  {
    const auto row = static_cast<Index>(6 * n);
    field.segment<3>(row) = acceleration.at(structure.nodes[n]);
    field.segment<3>(row + 3) = acceleration.angular;
  }
  return -(structure.mass * field);
}

Vector6 resultant(const Structure& structure, const Eigen::Ref<const VectorX>& forces,
                  const Vector3& point)
{
  Vector6 sum = Vector6::Zero();
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
  {
    const auto row = static_cast<Index>(6 * n);
    const Vector3 force = forces.segment<3>(row);
    sum.head<3>() += force;
    sum.tail<3>() += (structure.nodes[n] - point).cross(force) + forces.segment<3>(row + 3);
  }
  return sum;
}
} // namespace carlin
