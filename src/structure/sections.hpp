#pragma once

#include "carlin/description/model.hpp"
#include "carlin/section/member_section.hpp"
#include "carlin/section/shell_section.hpp"

#include <string>

namespace carlin
{
/// Entries of the model by name. @throws ModelError at `where` if there is none.
const Schedule& schedule_named(const Model& model, const std::string& name,
                               const FileLocation& where);
const Profile& profile_named(const Model& model, const std::string& name,
                             const FileLocation& where);
const Material& material_named(const Model& model, const std::string& name,
                               const FileLocation& where);

/// Offset of a schedule's mid-thickness from the moulded line, along the inward normal [m].
double plate_offset(const Schedule& schedule);

ShellSection section_of(const Model& model, const Schedule& schedule);

enum class ToeSide
{
  as_drawn, ///< toe on the side of local y = z x x
  mirrored  ///< on the other side, as to starboard
};
MemberSection section_of(const Model& model, const Profile& profile, ToeSide side);
} // namespace carlin
