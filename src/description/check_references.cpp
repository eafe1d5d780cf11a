#include "keys.hpp"
#include "readers.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <map>
#include <set>

namespace carlin::reading
{
namespace
{
/// Names in the order in which they should be listed, each once.
class Names
{
public:
  void add(const std::string& name)
  {
    if (!name.empty() && set_.insert(name).second)
      list_.push_back(name);
  }
  template <class Things> void add_all(const Things& things)
  {
    for (const auto& thing : things)
      add(thing.name);
  }
  bool has(const std::string& name) const { return set_.contains(name); }
  const std::vector<std::string>& list() const { return list_; }

private:
  std::vector<std::string> list_;
  std::set<std::string> set_;
};

void add_parts(const std::vector<PlatePart>& plates, const std::vector<MemberPart>& members,
               std::map<Refers, Names>& names)
{
  for (const PlatePart& plate : plates)
    for (const std::string& name : {plate.family, plate.name})
    {
      names[Refers::plate].add(name);
      names[Refers::part].add(name);
    }
  for (const MemberPart& member : members)
    for (const std::string& name : {member.family, member.name})
    {
      names[Refers::member].add(name);
      names[Refers::part].add(name);
    }
}

std::map<Refers, Names> known_names(const Model& model)
{
  std::map<Refers, Names> names;
  names[Refers::material].add_all(model.materials);
  names[Refers::schedule].add_all(model.schedules);
  names[Refers::profile].add_all(model.profiles);
  names[Refers::tank].add_all(model.tanks);
  names[Refers::configuration].add_all(model.configurations);
  if (model.hull)
  {
    names[Refers::station].add_all(model.hull->stations);
    names[Refers::buttock].add("centreline");
    names[Refers::buttock].add_all(model.hull->buttocks);
    names[Refers::buttock].add("chine");
    names[Refers::height].add("bottom");
    names[Refers::height].add_all(model.hull->heights);
    names[Refers::height].add("deck");
  }
  for (const Refers kind : {Refers::station, Refers::buttock, Refers::height})
    for (const std::string& name : names[kind].list())
      names[Refers::plane].add(name);
  add_parts(model.plates, model.members, names);
  for (const Configuration& configuration : model.configurations)
    add_parts(configuration.plates, configuration.members, names);
  if (model.frame)
  {
    names[Refers::point].add_all(model.frame->points);
    names[Refers::member].add_all(model.frame->members);
    names[Refers::plate].add_all(model.frame->plates);
    names[Refers::part].add_all(model.frame->members);
    names[Refers::part].add_all(model.frame->plates);
  }
  return names;
}
} // namespace

std::string does_not_exist(std::string_view kind, const std::string& name,
                           const std::vector<std::string>& known)
{
  if (known.empty())
    return fmt::format("{} '{}' does not exist; there are none, add it", kind, name);
  const std::string nearest = nearest_name(name, known);
  const std::string guess = nearest.empty() ? "" : fmt::format("did you mean '{}'? ", nearest);
  return fmt::format("{} '{}' does not exist; {}there are {}", kind, name, guess, listed(known));
}

void check_references(const Model& model, Findings& findings)
{
  const std::map<Refers, Names> names = known_names(model);
  for (const Reference& reference : findings.references)
  {
    const auto kind = names.find(reference.refers);
    if (kind != names.end() && kind->second.has(reference.name))
      continue;
    const std::vector<std::string> known =
        kind == names.end() ? std::vector<std::string>{} : kind->second.list();
    findings.problems.push_back(
        {reference.where,
         fmt::format("{}: {}", reference.path,
                     does_not_exist(kind_name(reference.refers), reference.name, known))});
  }
}
} // namespace carlin::reading
