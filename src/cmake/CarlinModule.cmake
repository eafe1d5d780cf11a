# carlin_options carries warnings and sanitizers; it is never exported.
add_library(carlin_options INTERFACE)
target_compile_options(carlin_options INTERFACE -Wall -Wextra -Wpedantic -Wshadow -Wconversion
  $<$<BOOL:${CARLIN_WARNINGS_AS_ERRORS}>:-Werror>)
if(CARLIN_SANITIZE)
  target_compile_options(carlin_options INTERFACE -fsanitize=${CARLIN_SANITIZE} -fno-omit-frame-pointer
    -fno-sanitize-recover=all)
  target_link_options(carlin_options INTERFACE -fsanitize=${CARLIN_SANITIZE})
endif()

# carlin_add_module(<name> SOURCES ... [PUBLIC lib...] [PRIVATE lib...])
# One static library a module; the PUBLIC and PRIVATE lists are the dependency diagram.
function(carlin_add_module name)
  cmake_parse_arguments(PARSE_ARGV 1 arg "" "" "SOURCES;PUBLIC;PRIVATE")
  add_library(carlin_${name} STATIC ${arg_SOURCES})
  add_library(carlin::${name} ALIAS carlin_${name})
  target_compile_features(carlin_${name} PUBLIC cxx_std_20)
  target_include_directories(carlin_${name}
    PUBLIC $<BUILD_INTERFACE:${PROJECT_SOURCE_DIR}/include> $<INSTALL_INTERFACE:include>)
  target_link_libraries(carlin_${name} PUBLIC ${arg_PUBLIC}
    PRIVATE ${arg_PRIVATE} $<BUILD_INTERFACE:carlin_options>)
  set_property(GLOBAL APPEND PROPERTY CARLIN_MODULES carlin_${name})
endfunction()

# carlin_add_test(<name> SOURCES ... LIBRARIES ... [LABELS ...]): a Catch2 program, its cases found by ctest.
function(carlin_add_test name)
  cmake_parse_arguments(PARSE_ARGV 1 arg "" "" "SOURCES;LIBRARIES;LABELS")
  add_executable(${name} ${arg_SOURCES})
  target_link_libraries(${name} PRIVATE ${arg_LIBRARIES} carlin_test_main carlin_options)
  target_include_directories(${name} PRIVATE ${PROJECT_SOURCE_DIR}/tests/support)
  target_compile_definitions(${name} PRIVATE
    CARLIN_SOURCE_DIR="${PROJECT_SOURCE_DIR}" CARLIN_COMMAND="$<TARGET_FILE:carlin_command>")
  catch_discover_tests(${name} TEST_PREFIX "${name}: " PROPERTIES LABELS "${arg_LABELS}" TIMEOUT 600)
endfunction()
