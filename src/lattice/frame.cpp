#include "mapped_parts.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <map>
#include <unordered_map>

namespace carlin
{
namespace
{
/// Points by place: two within the tolerance are one. Boxes of a much larger size than the
/// tolerance are looked up, with those around them.
class PointMerger
{
public:
  PointMerger(std::vector<Vector3>& points, double tolerance)
      : points_(points), tolerance_(tolerance), box_(16.0 * tolerance)
  {
    for (std::size_t i = 0; i < points.size(); ++i)
      boxes_.emplace(key(box_of(points[i])), static_cast<Index>(i));
  }

  Index point(const Vector3& position)
  {
    const Box3 low = box_of(position.array() - tolerance_),
               high = box_of(position.array() + tolerance_);
    for (std::int64_t a = low[0]; a <= high[0]; ++a)
      for (std::int64_t b = low[1]; b <= high[1]; ++b)
        for (std::int64_t c = low[2]; c <= high[2]; ++c)
        {
          const auto [first, last] = boxes_.equal_range(key({a, b, c}));
          for (auto found = first; found != last; ++found)
            if ((points_[static_cast<std::size_t>(found->second)] - position).norm() <= tolerance_)
              return found->second;
        }
    points_.push_back(position);
    const Index index = std::ssize(points_) - 1;
    boxes_.emplace(key(box_of(position)), index);
    return index;
  }

private:
  using Box3 = std::array<std::int64_t, 3>;

  Box3 box_of(const Vector3& position) const
  {
    return {std::llround(std::floor(position.x() / box_)),
            std::llround(std::floor(position.y() / box_)),
            std::llround(std::floor(position.z() / box_))};
  }
  static std::uint64_t key(const Box3& box)
  {
    std::uint64_t hash = 0; // equal keys of different boxes cost a comparison, nothing else
    for (const std::int64_t number : box)
      hash = (hash ^ static_cast<std::uint64_t>(number)) * 0x9E3779B97F4A7C15ULL;
    return hash;
  }

  std::vector<Vector3>& points_;
  double tolerance_, box_;
  std::unordered_multimap<std::uint64_t, Index> boxes_;
};

double size_of(const Frame& frame, const std::vector<Vector3>& others)
{
  Vector3 low = Vector3::Constant(1e300), high = -low;
  const auto widen = [&](const Vector3& position)
  {
    low = low.cwiseMin(position);
    high = high.cwiseMax(position);
  };
  for (const FramePoint& point : frame.points)
    widen(point.position);
  for (const Vector3& position : others)
    widen(position);
  return (high - low).norm();
}

class FrameBuilder
{
public:
  FrameBuilder(const Frame& frame, Mesh& mesh)
      : mesh_(mesh), merger_(mesh.points, 1e-9 * size_of(frame, mesh.points))
  {
    for (const FramePoint& point : frame.points)
    {
      const Index index = merger_.point(point.position);
      mesh.named_points.emplace_back(point.name, index);
      by_name_[point.name] = index;
    }
  }

  void add(const FrameMember& member)
  {
    const Vector3 from = position(member.from, member), to = position(member.to, member);
    const Vector3 tangent = (to - from).normalized();
    check_divisions(member.divisions, member);
    if ((to - from).norm() == 0.0)
      throw ModelError(member.where, fmt::format("'{}': points '{}' and '{}' lie on one another",
                                                 member.name, member.from, member.to));
    const Vector3 square = member.upright - member.upright.dot(tangent) * tangent;
    if (!(square.norm() > 1e-6 * member.upright.norm()))
      throw ModelError(member.where, fmt::format("'{}': its upright is along the member; give a "
                                                 "direction across it",
                                                 member.name));
    Run run;
    run.part = add_part(member, MeshPart::Kind::member, member.profile);
    run.stands_on_plating = false;
    run.offset_from = member.offset_from;
    run.offset_to = member.offset_to;
    for (Index i = 0; i <= member.divisions; ++i)
      run.points.push_back(merger_.point(between(from, to, i, member.divisions)));
    const auto segments = static_cast<std::size_t>(member.divisions);
    const Vector3 upright = square.normalized();
    run.upright.assign(segments, upright);
    run.toe.assign(segments, toe_direction(upright, tangent));
    mesh_.runs.push_back(std::move(run));
  }

  void add(const FramePlate& plate)
  {
    if (plate.corners.size() != 4 || plate.divisions.size() != 2)
      throw ModelError(plate.where,
                       fmt::format("'{}': a plate has four corners and two divisions", plate.name));
    std::array<Vector3, 4> corners;
    for (std::size_t i = 0; i < 4; ++i)
      corners[i] = position(plate.corners[i], plate);
    const Index along_12 = plate.divisions[0], along_23 = plate.divisions[1];
    check_divisions(along_12, plate);
    check_divisions(along_23, plate);
    std::vector<Index> points;
    for (Index b = 0; b <= along_23; ++b)
    {
      const Vector3 first = between(corners[0], corners[3], b, along_23),
                    last = between(corners[1], corners[2], b, along_23);
      for (Index a = 0; a <= along_12; ++a)
        points.push_back(merger_.point(between(first, last, a, along_12)));
    }
    const Index part = add_part(plate, MeshPart::Kind::plate, plate.schedule);
    const auto at = [&](Index a, Index b)
    { return points[static_cast<std::size_t>(b * (along_12 + 1) + a)]; };
    for (Index b = 0; b < along_23; ++b)
      for (Index a = 0; a < along_12; ++a)
        mesh_.cells.push_back({{at(a, b), at(a + 1, b), at(a + 1, b + 1), at(a, b + 1)}, part});
  }

private:
  /// The same to the last bit from either end, so that neighbours find each other's points.
  static Vector3 between(const Vector3& from, const Vector3& to, Index i, Index divisions)
  {
    const auto n = static_cast<double>(divisions);
    return from * (static_cast<double>(divisions - i) / n) + to * (static_cast<double>(i) / n);
  }

  Vector3 position(const std::string& name, const Named& who) const
  {
    const auto found = by_name_.find(name);
    if (found == by_name_.end())
      throw ModelError(who.where,
                       fmt::format("'{}': there is no frame point '{}'", who.name, name));
    return mesh_.points[static_cast<std::size_t>(found->second)];
  }

  static void check_divisions(Index divisions, const Named& who)
  {
    if (divisions < 1)
      throw ModelError(who.where, fmt::format("'{}': divisions is {}; it must be 1 or more",
                                              who.name, divisions));
  }

  Index add_part(const Named& named, MeshPart::Kind kind, const std::string& material_use)
  {
    MeshPart part;
    part.name = part.family = named.name;
    part.kind = kind;
    part.material_use = material_use;
    part.where = named.where;
    mesh_.parts.push_back(std::move(part));
    return std::ssize(mesh_.parts) - 1;
  }

  Mesh& mesh_;
  PointMerger merger_;
  std::map<std::string, Index> by_name_;
};
} // namespace

void add_frame(const Frame& frame, Mesh& mesh, std::vector<Problem>& problems)
{
  FrameBuilder builder(frame, mesh);
  const auto add_all = [&](const auto& entries)
  {
    for (const auto& entry : entries)
      try
      {
        builder.add(entry);
      }
      catch (const ModelError& error)
      {
        problems.insert(problems.end(), error.problems().begin(), error.problems().end());
      }
  };
  add_all(frame.plates);
  add_all(frame.members);
}
} // namespace carlin
