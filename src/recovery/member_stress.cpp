#include "geometry.hpp"

#include "carlin/recovery/stress.hpp"

#include <cmath>

namespace carlin
{
namespace
{
/// Area over which a shear force is a mean: the shear area, or the whole where rigid in shear.
double mean_shear(double force, double shear_area, double area)
{
  return force / (std::isfinite(shear_area) ? shear_area : area);
}

void put_end(MemberStress& result, const MemberSection& section, const Vector6& forces,
             const Vector3& place)
{
  const ProfileConstants& profile = section.profile;
  const std::vector<Vector2> centroid{Vector2::Zero()};
  const std::vector<Vector2>& points =
      profile.stress_points.empty() ? centroid : profile.stress_points;
  for (const Vector2& point : points)
  {
    const double stress = member_stress(section, forces, point);
    if (std::abs(stress) > std::abs(result.nominal) * (1.0 + 1e-9)) // first of equals
    {
      result.nominal = stress;
      result.place = place;
    }
  }
  const double shear = std::hypot(mean_shear(forces[1], profile.shear_area_y, profile.area),
                                  mean_shear(forces[2], profile.shear_area_z, profile.area));
  result.shear = std::max(result.shear, shear);
}
} // namespace

std::vector<MemberStress> member_stresses(const Structure& structure, const StageSolution& stage)
{
  std::vector<MemberStress> results;
  results.reserve(structure.members.size());
  for (std::size_t m = 0; m < structure.members.size(); ++m)
  {
    const Member& member = structure.members[m];
    const MemberSection& section =
        structure.member_sections[static_cast<std::size_t>(member.section)];
    const Vector12 fixed_end =
        stage.member_fixed_end.empty() ? Vector12(Vector12::Zero()) : stage.member_fixed_end[m];
    const MemberForces forces =
        member_forces(member_geometry(structure, member), section,
                      member_displacement(member, stage.displacement), fixed_end);
    MemberStress result;
    result.place = node_position(structure, member.nodes[0]) + member.offset_1;
    put_end(result, section, forces.end_1, result.place);
    put_end(result, section, forces.end_2,
            node_position(structure, member.nodes[1]) + member.offset_2);
    results.push_back(result);
  }
  return results;
}

std::vector<JointLoad> joint_loads(const Structure& structure, const StageSolution& stage)
{
  std::vector<JointLoad> results;
  results.reserve(structure.joints.size());
  for (std::size_t s = 0; s < structure.joints.size(); ++s)
  {
    const JointSpring& spring = structure.joints[s];
    const Vector3 moved =
        spring.axes.transpose() * (translation(stage.displacement, spring.node_part) -
                                   translation(stage.displacement, spring.node_other));
    const double turned = spring.axes.col(0).dot(rotation(stage.displacement, spring.node_part) -
                                                 rotation(stage.displacement, spring.node_other));
    const double length = spring.tributary_length;
    results.push_back({.joint = spring.joint,
                       .spring = static_cast<Index>(s),
                       .along = spring.stiffness[0] * moved[0] / length,
                       .across = spring.stiffness[1] * moved[1] / length,
                       .normal = spring.stiffness[2] * moved[2] / length,
                       .rotation = spring.stiffness[3] * turned / length,
                       .slip = moved[0]});
  }
  return results;
}
} // namespace carlin
