carlin_add_test(description_quantity_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/description_quantity_test.cpp
  LIBRARIES carlin::core LABELS unit)
