carlin_add_test(collars_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/verification/collars_locking_test.cpp
          ${CMAKE_CURRENT_SOURCE_DIR}/verification/collars_sliding_test.cpp
          ${CMAKE_CURRENT_SOURCE_DIR}/verification/collars_hull_test.cpp
  LIBRARIES carlin::mounts carlin_verification_record LABELS verification)
