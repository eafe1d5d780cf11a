carlin_add_test(recovery_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/recovery_stiffness_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/recovery_stress_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/recovery_deflection_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/support/hand_structure.cpp
  LIBRARIES carlin::recovery LABELS unit)
