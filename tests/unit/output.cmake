carlin_add_test(output_test
  SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/output_test.cpp
          ${CMAKE_CURRENT_SOURCE_DIR}/unit/output_files_test.cpp
          ${CMAKE_CURRENT_SOURCE_DIR}/unit/output_vtk_test.cpp
          ${CMAKE_CURRENT_SOURCE_DIR}/unit/output_sample.cpp
  LIBRARIES carlin::output fmt::fmt VTK::CommonCore VTK::CommonDataModel VTK::CommonMisc VTK::IOXML
  LABELS unit)
target_include_directories(output_test PRIVATE ${CMAKE_CURRENT_SOURCE_DIR}/unit
  ${CMAKE_CURRENT_SOURCE_DIR}/../src/output)
