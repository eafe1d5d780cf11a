carlin_add_test(section_test SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/section_test.cpp
  LIBRARIES carlin::section LABELS unit)
