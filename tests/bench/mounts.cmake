carlin_add_test(mounts_bench SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/bench/mounts_bench.cpp
  LIBRARIES carlin::mounts carlin_verification_record LABELS bench)
