# Assembler of elements alone and the verification table, for tests.
add_library(carlin_element_model STATIC ${CMAKE_CURRENT_SOURCE_DIR}/support/element_model.cpp)
target_link_libraries(carlin_element_model PUBLIC carlin::element PRIVATE carlin_options)
add_library(carlin_verification_record STATIC
  ${CMAKE_CURRENT_SOURCE_DIR}/support/verification_record.cpp)
target_compile_features(carlin_verification_record PUBLIC cxx_std_20)
target_link_libraries(carlin_verification_record PRIVATE carlin_options)
foreach(library carlin_element_model carlin_verification_record)
  target_include_directories(${library} PUBLIC ${CMAKE_CURRENT_SOURCE_DIR}/support)
endforeach()

foreach(subject beams patches plates shells folded stress frames)
  carlin_add_test(element_${subject}_test
    SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/verification/${subject}_test.cpp
    LIBRARIES carlin_element_model carlin_verification_record LABELS verification)
endforeach()
