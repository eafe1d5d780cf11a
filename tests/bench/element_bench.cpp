// Rate of the element kernels. A launch of 60,000 freedoms has about 10,000 shells: at 5 us a
// shell its stiffness costs 0.05 s.
#include "carlin/element/member.hpp"
#include "carlin/element/shell.hpp"

#include <benchmark/benchmark.h>

using namespace carlin;

namespace
{
const QuadPoints quad = {Vector3(0.0, 0.0, 0.0), Vector3(1.1, 0.1, 0.0), Vector3(1.2, 0.9, 0.1),
                         Vector3(-0.1, 1.0, 0.0)};
const QuadPoints triangle = {quad[0], quad[1], quad[2], quad[2]};

/// @param offset Of the mid-thickness [m]; other than 0 couples membrane and bending.
ShellSection plate(double offset)
{
  return isotropic_shell_section(70e9, 0.33, 2700.0, 23e-6, 0.006, offset);
}

void stiffness(benchmark::State& state, const QuadPoints& points, double offset)
{
  const ShellSection section = plate(offset);
  for (auto _ : state)
    benchmark::DoNotOptimize(shell_stiffness(points, section, Vector3::UnitX()));
  state.SetItemsProcessed(state.iterations());
}

void mass(benchmark::State& state)
{
  const ShellSection section = plate(0.0);
  for (auto _ : state)
    benchmark::DoNotOptimize(shell_mass(quad, section));
  state.SetItemsProcessed(state.iterations());
}

void strain_matrix(benchmark::State& state)
{
  const ShellSection section = plate(0.003);
  for (auto _ : state)
    benchmark::DoNotOptimize(shell_strain_matrix(quad, section, Vector3::UnitX(), 0.0, 0.0));
  state.SetItemsProcessed(state.iterations());
}

void member(benchmark::State& state)
{
  const MemberSection section =
      member_section(angle_constants(0.09, 0.006, 0.05, 0.01), 70e9, 0.33, 2700.0, 23e-6);
  const MemberGeometry geometry = {Vector3::Zero(), Vector3(0.4, 0.1, 0.05),
                                   Vector3(0.0, 0.0, 0.06), Vector3(0.0, 0.0, 0.06),
                                   Vector3::UnitZ()};
  for (auto _ : state)
    benchmark::DoNotOptimize(member_stiffness(geometry, section));
  state.SetItemsProcessed(state.iterations());
}
} // namespace

BENCHMARK_CAPTURE(stiffness, quad, quad, 0.0)->Name("shell_stiffness/quad");
BENCHMARK_CAPTURE(stiffness, quad_offset, quad, 0.003)->Name("shell_stiffness/quad_offset");
BENCHMARK_CAPTURE(stiffness, triangle, triangle, 0.0)->Name("shell_stiffness/triangle");
BENCHMARK(mass)->Name("shell_mass/quad");
BENCHMARK(strain_matrix)->Name("shell_strain_matrix/quad_offset");
BENCHMARK(member)->Name("member_stiffness");
