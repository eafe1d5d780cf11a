carlin_add_test(loads_test SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/loads_test.cpp
  LIBRARIES carlin::solution carlin::loads LABELS unit)
