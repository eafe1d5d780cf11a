carlin_add_test(description_quantity_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/description_quantity_test.cpp
  LIBRARIES carlin::core LABELS unit)
carlin_add_test(description_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/description_reader_test.cpp
          ${CMAKE_CURRENT_SOURCE_DIR}/unit/description_configured_test.cpp
  LIBRARIES carlin::description LABELS unit)
