carlin_add_test(warping_test SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/verification/warping_test.cpp
  LIBRARIES carlin_chain carlin_verification_record LABELS verification)
