// Assembly, factorization and solution of a box hull with bulkheads and stringers at four sizes.
// Argument: cells along the hull of 9 m. Run: structure_bench --benchmark_counters_tabular=true
#include "box_mesh.hpp"

#include "carlin/solution/hull_solver.hpp"

#include <benchmark/benchmark.h>

namespace
{
using namespace carlin;

test::MeshBuilder hull(int along)
{
  test::MeshBuilder builder;
  const int across = along * 2 / 9 * 2;
  test::add_box(builder, {.cells = {along, across, along / 9 * 2}, .bulkheads = {3.0, 6.0}});
  for (int i = 1; i < 4; ++i)
  {
    const double y = -1.3 + 2.6 * (i * (across / 4)) / across;
    builder.member("stringer-" + std::to_string(i), "bar", Vector3(0, y, 0), Vector3(9, y, 0),
                   along, Vector3::UnitZ());
  }
  return builder;
}

void report(benchmark::State& state, const Structure& structure)
{
  state.SetItemsProcessed(state.iterations() * structure.stiffness.rows());
  state.counters["freedoms"] = static_cast<double>(structure.stiffness.rows());
}

void assembly(benchmark::State& state)
{
  const Model model = test::small_model();
  const test::MeshBuilder builder = hull(static_cast<int>(state.range(0)));
  Structure structure;
  for (auto _ : state)
    structure = build_structure(model, ConfiguredCraft{}, builder.mesh, Outfit{});
  report(state, structure);
}

/// Connectivity, pins, reduction, ordering and factorization.
void factorization(benchmark::State& state)
{
  const test::MeshBuilder builder = hull(static_cast<int>(state.range(0)));
  const Structure structure =
      build_structure(test::small_model(), ConfiguredCraft{}, builder.mesh, Outfit{});
  for (auto _ : state)
  {
    const HullSolver solver(structure);
    benchmark::DoNotOptimize(solver.held_freedoms().data());
  }
  report(state, structure);
}

void solution_32(benchmark::State& state)
{
  const test::MeshBuilder builder = hull(static_cast<int>(state.range(0)));
  const Structure structure =
      build_structure(test::small_model(), ConfiguredCraft{}, builder.mesh, Outfit{});
  const HullSolver solver(structure);
  const MatrixX forces = MatrixX::Ones(structure.stiffness.rows(), 32);
  for (auto _ : state)
  {
    const MatrixX u = solver.solve(forces);
    benchmark::DoNotOptimize(u.data());
  }
  report(state, structure);
}

BENCHMARK(assembly)->Arg(18)->Arg(54)->Arg(81)->Arg(108)->Unit(benchmark::kMillisecond);
BENCHMARK(factorization)->Arg(18)->Arg(54)->Arg(81)->Arg(108)->Unit(benchmark::kMillisecond);
BENCHMARK(solution_32)->Arg(18)->Arg(54)->Arg(81)->Arg(108)->Unit(benchmark::kMillisecond);
} // namespace

BENCHMARK_MAIN();
