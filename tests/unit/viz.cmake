if(TARGET carlin_scene)
  carlin_add_test(scene_test
    SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/unit/scene_test.cpp
            ${CMAKE_CURRENT_SOURCE_DIR}/unit/output_sample.cpp
    LIBRARIES carlin_scene carlin::output
    LABELS unit)
  target_include_directories(scene_test PRIVATE ${CMAKE_CURRENT_SOURCE_DIR}/unit)
  carlin_add_test(picture_test
    SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/viewer/picture_test.cpp
            ${CMAKE_CURRENT_SOURCE_DIR}/unit/output_sample.cpp
    LIBRARIES carlin_picture_maker carlin::output VTK::IOImage
    LABELS viewer)
  target_include_directories(picture_test PRIVATE ${CMAKE_CURRENT_SOURCE_DIR}/unit)
  target_compile_definitions(picture_test PRIVATE
    CARLIN_PICTURE="$<TARGET_FILE:carlin-picture>")
  add_dependencies(picture_test carlin-picture)
endif()
