carlin_add_test(floating_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/verification/still_water_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/verification/inertia_relief_test.cpp
    ${CMAKE_CURRENT_SOURCE_DIR}/verification/fastened_test.cpp
  LIBRARIES carlin::solution carlin::loads LABELS verification)
