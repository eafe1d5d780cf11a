carlin_add_test(lattice_test SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/lattice_test.cpp
  LIBRARIES carlin::lattice LABELS unit)
