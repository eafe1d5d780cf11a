find_package(benchmark REQUIRED)
add_executable(structure_bench ${CMAKE_CURRENT_SOURCE_DIR}/bench/structure_bench.cpp)
target_link_libraries(structure_bench PRIVATE carlin::solution benchmark::benchmark carlin_options)
target_include_directories(structure_bench PRIVATE ${PROJECT_SOURCE_DIR}/tests/support)
add_test(NAME structure_bench
  COMMAND structure_bench --benchmark_filter=/18$ --benchmark_min_time=0)
set_tests_properties(structure_bench PROPERTIES LABELS bench)
