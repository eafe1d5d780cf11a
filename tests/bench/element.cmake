find_package(benchmark 1.7 REQUIRED)
add_executable(element_bench ${CMAKE_CURRENT_SOURCE_DIR}/bench/element_bench.cpp)
target_link_libraries(element_bench PRIVATE carlin::element benchmark::benchmark_main carlin_options)
# One short pass, so that it does not rot; measure with: element_bench --benchmark_min_time=1
add_test(NAME element_bench COMMAND element_bench --benchmark_min_time=0.001)
set_tests_properties(element_bench PROPERTIES LABELS bench TIMEOUT 60)
