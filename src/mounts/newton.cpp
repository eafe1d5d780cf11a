#include "newton.hpp"

#include <cmath>

namespace carlin::mounts
{
namespace
{
/// Below this reciprocal condition of the scaled matrix a regime is a mechanism: the softest true
/// system (a tank afloat in its clearance, 1e-10 of the lining) stays some decades above it.
constexpr double singular_condition = 1e-15;

Eigen::PartialPivLU<MatrixX> factor(const Model& model, const Equations& equations)
{
  return Eigen::PartialPivLU<MatrixX>(model.row_scale.asDiagonal() * equations.jacobian *
                                      model.column_scale.asDiagonal());
}

VectorX solve_scaled(const Model& model, const Eigen::PartialPivLU<MatrixX>& lu,
                     const VectorX& right)
{
  const VectorX scaled = lu.solve(model.row_scale.cwiseProduct(right));
  return model.column_scale.cwiseProduct(scaled);
}

bool is_settled(const Model& model, const Equations& equations)
{
  const VectorX residual = model.row_scale.cwiseProduct(equations.residual.cwiseAbs());
  const VectorX magnitude = model.row_scale.cwiseProduct(equations.magnitude);
  const double floor = 1e-15 * magnitude.maxCoeff();
  return ((1e-12 * magnitude).array() + floor >= residual.array()).all();
}

double merit(const Model& model, const Equations& equations)
{
  return model.row_scale.cwiseProduct(equations.residual).norm();
}
} // namespace

double force_scale(const Model& model, const VectorX& x)
{
  double scale = 1e-6;
  for (Index c = 0; c < model.collar_count; ++c)
    scale = std::max(scale, x.segment<3>(6 * c).cwiseAbs().maxCoeff());
  return scale;
}

std::optional<VectorX> solve_at(Stage& stage, const Regime& regime, const VectorX& start, double t,
                                const VectorX& guess)
{
  constexpr int iteration_limit = 80;
  constexpr int deepest = 24; // a step out of contact may be far too long
  const Model& model = stage.model;
  const LoadState now = stage.at(t);
  Equations& equations = stage.equations;
  VectorX x = guess;
  assemble(model, regime, start, now, stage.rate, x, equations);
  for (int i = 0; i < iteration_limit; ++i)
  {
    if (is_settled(model, equations))
      return x;
    ++stage.iterations;
    const double before = merit(model, equations);
    const VectorX step = solve_scaled(model, factor(model, equations), equations.residual);
    if (!step.allFinite())
      return std::nullopt;
    double share = 1.0;
    for (int halving = 0; halving <= deepest; ++halving, share *= 0.5)
    {
      const VectorX trial = x - share * step;
      assemble(model, regime, start, now, stage.rate, trial, equations);
      if (is_settled(model, equations) || merit(model, equations) <= (1.0 - 1e-3 * share) * before)
      {
        x = trial;
        break;
      }
      if (halving == deepest)
        return std::nullopt;
    }
  }
  return std::nullopt;
}

std::optional<VectorX> solve_rate(Stage& stage, const Regime& regime, const VectorX& x, double t)
{
  ++stage.iterations;
  assemble(stage.model, regime, x, stage.at(t), stage.rate, x, stage.equations);
  const Eigen::PartialPivLU<MatrixX> lu = factor(stage.model, stage.equations);
  if (!(lu.rcond() > singular_condition))
    return std::nullopt;
  const VectorX rate = solve_scaled(stage.model, lu, stage.equations.rate);
  if (!rate.allFinite())
    return std::nullopt;
  return -rate;
}
} // namespace carlin::mounts
