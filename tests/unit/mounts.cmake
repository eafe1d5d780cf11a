carlin_add_test(mounts_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/mounts_test.cpp
          ${CMAKE_CURRENT_SOURCE_DIR}/unit/mounts_ring_test.cpp
          ${CMAKE_CURRENT_SOURCE_DIR}/unit/mounts_invariance_test.cpp
  LIBRARIES carlin::mounts carlin_verification_record LABELS unit)
