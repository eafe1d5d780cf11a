#pragma once

#include "laws.hpp"

#include <optional>

namespace carlin::mounts
{
/// A stage from its start (t = 0) to its end (t = 1), loads linear in t, and the work space of its
/// solutions.
struct Stage
{
  const Model& model;
  LoadState from, to, rate;
  int iterations = 0;
  Equations equations = {};

  LoadState at(double t) const { return blend(from, to, t); }
};

/// Scale of force at x: below 1e-10 of it nothing is decided.
double force_scale(const Model& model, const VectorX& x);

/// x at t under a regime held fixed, slips counted from `start`; none when Newton does not settle.
std::optional<VectorX> solve_at(Stage& stage, const Regime& regime, const VectorX& start, double t,
                                const VectorX& guess);

/// dx/dt under a regime; none when the regime lets something move freely.
std::optional<VectorX> solve_rate(Stage& stage, const Regime& regime, const VectorX& x, double t);
} // namespace carlin::mounts
