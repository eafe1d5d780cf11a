carlin_add_test(element_shell_test SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/element_shell_test.cpp
  LIBRARIES carlin::element LABELS unit)
carlin_add_test(element_member_test SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/element_member_test.cpp
  LIBRARIES carlin::element LABELS unit)
