#pragma once

#include "carlin/description/model.hpp"

namespace carlin
{
/// The base as modelled: what the first configuration edits.
ConfiguredCraft unedited(const Model& model);

/// Applies one edit of configuration `by` to `craft`; parts that the edit does not touch stay.
void apply(const Model& model, const Edit& edit, const std::string& by, ConfiguredCraft& craft);

/// Adds and removes what configuration says, after its edits; sets its tanks.
void add_parts(const Model& model, const Configuration& configuration, ConfiguredCraft& craft);

/// Whether `name` addresses a part: by its own name or by that of its entry.
template <class Part> bool addresses(const std::string& name, const Part& part)
{
  return part.name == name || part.family == name;
}
} // namespace carlin
