#include "model.hpp"

#include <cassert>

namespace carlin::mounts
{
LoadState zero_loads(const Model& model)
{
  LoadState state;
  state.rows = VectorX::Zero(model.size);
  state.relative = VectorX::Zero(6 * model.collar_count);
  state.press = VectorX::Zero(static_cast<Index>(model.slides.size()));
  state.interference = VectorX::Zero(static_cast<Index>(model.rings.size()));
  for (std::size_t r = 0; r < model.rings.size(); ++r)
    state.interference(static_cast<Index>(r)) = model.rings[r].preload;
  return state;
}

namespace
{
/// Rows of a collar whose laws follow the relative motion carry its load part too.
void add_relative_to_rows(const Model& model, LoadState& state)
{
  for (Index row = 0; row < 6 * model.collar_count; ++row)
  {
    const Index collar = row / 6;
    const Index component = row % 6;
    const bool is_ring_row = model.ring_of_collar[static_cast<std::size_t>(collar)] >= 0 &&
                             (component == 1 || component == 2);
    // A released pivot's row reads only its own moment: no tank motion in it.
    const Index tank = model.tank_of_collar[static_cast<std::size_t>(collar)];
    const bool is_released =
        component > 2 && model.linear(row, model.rigid(tank) + component) == 0.0;
    if (!is_ring_row && !is_released)
      state.rows(row) += state.relative(row);
  }
}
} // namespace

LoadState make_loads(const Model& model, const MountStage& stage)
{
  LoadState state = zero_loads(model);
  for (Index c = 0; c < model.collar_count; ++c)
  {
    const auto uc = static_cast<std::size_t>(c);
    const auto tank = static_cast<std::size_t>(model.tank_of_collar[uc]);
    const Beam& beam = model.beams[tank];
    const BeamLoad load = make_beam_load(beam, stage.tanks[tank]);
    state.relative.segment<6>(6 * c) = load_motion(beam, load, model.position_of_collar[uc]);
    if (model.ring_of_collar[uc] >= 0)
      state.interference(model.ring_of_collar[uc]) += stage.tanks[tank].radial_growth;
  }
  state.relative -= model.seats.ring_by_motion * stage.foot_motion;
  add_relative_to_rows(model, state);
  for (Index t = 0; t < model.tank_count; ++t)
  {
    const Beam& beam = model.beams[static_cast<std::size_t>(t)];
    const Vector6 resultant =
        load_resultant(beam, make_beam_load(beam, stage.tanks[static_cast<std::size_t>(t)]));
    assert(resultant(3) == 0.0); // loads act on the axis
    state.rows.segment<6>(model.rigid(t)) = resultant;
  }
  const VectorX feet = model.seats.foot_by_motion * stage.foot_motion;
  for (std::size_t i = 0; i < model.slides.size(); ++i)
  {
    const Slide& slide = model.slides[i];
    if (slide.foot < 0)
      continue;
    state.rows(slide.first) = -feet(6 * slide.foot);
    state.press(static_cast<Index>(i)) = slide.press_sign * feet(6 * slide.foot + 2);
  }
  return state;
}

LoadState blend(const LoadState& from, const LoadState& to, double t)
{
  if (t >= 1.0)
    return to;
  LoadState state;
  state.rows = (1.0 - t) * from.rows + t * to.rows;
  state.relative = (1.0 - t) * from.relative + t * to.relative;
  state.press = (1.0 - t) * from.press + t * to.press;
  state.interference = (1.0 - t) * from.interference + t * to.interference;
  return state;
}

LoadState difference(const LoadState& from, const LoadState& to)
{
  return {to.rows - from.rows, to.relative - from.relative, to.press - from.press,
          to.interference - from.interference};
}
} // namespace carlin::mounts
