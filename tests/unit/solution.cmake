carlin_add_test(solution_test SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/solution_test.cpp
  LIBRARIES carlin::solution LABELS unit)
