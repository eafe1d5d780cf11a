carlin_add_test(structure_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/structure_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/structure_joint_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/structure_mass_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/structure_footprint_test.cpp
  LIBRARIES carlin::structure carlin::solution LABELS unit)
