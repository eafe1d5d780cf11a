carlin_add_test(checks_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/checks_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/unit/checks_mount_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/support/hand_structure.cpp
  LIBRARIES carlin::checks LABELS unit)
