add_library(carlin_chain STATIC ${CMAKE_CURRENT_SOURCE_DIR}/support/chain.cpp)
target_link_libraries(carlin_chain PUBLIC carlin_job PRIVATE carlin_options)
target_include_directories(carlin_chain PUBLIC ${CMAKE_CURRENT_SOURCE_DIR}/support)
target_compile_definitions(carlin_chain PRIVATE CARLIN_SOURCE_DIR="${PROJECT_SOURCE_DIR}")
foreach(group beams mounts floating)
  carlin_add_test(chain_${group}_test
    SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/verification/chain_${group}_test.cpp
    LIBRARIES carlin_chain fmt::fmt LABELS verification)
endforeach()
