carlin_add_test(lattice_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/lattice_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/lattice_parts_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/lattice_frame_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/lattice_errors_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/lattice_quality_test.cpp
  LIBRARIES carlin::lattice LABELS unit)
