carlin_add_test(core_test SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/core_test.cpp
  LIBRARIES carlin::core LABELS unit)
