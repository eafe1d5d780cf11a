set(system_folder ${CMAKE_CURRENT_BINARY_DIR}/system-runs)
file(MAKE_DIRECTORY ${system_folder})
set(system_source ${CMAKE_CURRENT_SOURCE_DIR}/system)

# add_cli_test(<name> EXIT <status> MATCH <regex> [ABSENT <path>] ARGS ...): exit status and text
function(add_cli_test name)
  cmake_parse_arguments(PARSE_ARGV 1 arg "" "EXIT;MATCH;ABSENT" "ARGS")
  add_test(NAME "system: ${name}" COMMAND ${CMAKE_COMMAND}
    "-DCOMMAND=$<TARGET_FILE:carlin_command>;${arg_ARGS}" -DEXIT=${arg_EXIT} "-DMATCH=${arg_MATCH}"
    -DABSENT=${arg_ABSENT} -DFOLDER=${PROJECT_SOURCE_DIR} -P ${system_source}/scripts/expect.cmake)
  set_tests_properties("system: ${name}" PROPERTIES LABELS system TIMEOUT 600)
endfunction()

add_cli_test(help_shows_an_example EXIT 0 MATCH "carlin check models/starter.yaml" ARGS --help)
add_cli_test(version EXIT 0 MATCH "carlin 0.1" ARGS --version)
add_cli_test(no_subcommand EXIT 2 MATCH "subcommand" ARGS)
add_cli_test(missing_file EXIT 2 MATCH "cannot be opened"
  ABSENT ${system_folder}/nowhere ARGS check nowhere.yaml --into ${system_folder}/nowhere)
add_cli_test(unknown_configuration EXIT 2 MATCH "configuration 'cutt' does not exist; there are as built"
  ABSENT ${system_folder}/cutt
  ARGS check models/starter.yaml --into ${system_folder}/cutt --configuration cutt)
add_cli_test(unknown_case EXIT 2 MATCH "case 'storm' does not exist; there are still water, filled"
  ABSENT ${system_folder}/storm ARGS check models/starter.yaml --into ${system_folder}/storm --case storm)
add_cli_test(starter_draws EXIT 0 MATCH "drawing in"
  ARGS draw models/starter.yaml --into ${system_folder}/starter-drawing)
add_cli_test(launch_draws EXIT 0 MATCH "drawing in"
  ARGS draw models/survey-launch.yaml --into ${system_folder}/launch-drawing)
add_cli_test(folder_that_cannot_be_made EXIT 3 MATCH "no folder can be made there"
  ARGS check tests/verification/models/A3-point-load.yaml --into /proc/nowhere/results)
add_cli_test(loose_part_is_named EXIT 3 MATCH "loose bar"
  ABSENT ${system_folder}/loose ARGS check tests/system/loose-part.yaml --into ${system_folder}/loose)

add_test(NAME "system: broken models are refused with their messages"
  COMMAND ${CMAKE_COMMAND} -DCARLIN=$<TARGET_FILE:carlin_command> -DBROKEN=${system_source}/broken
    -DFOLDER=${system_folder} -P ${system_source}/scripts/broken.cmake)
set_tests_properties("system: broken models are refused with their messages" PROPERTIES LABELS system)

add_executable(compare_tables ${system_source}/compare_tables.cpp)
target_link_libraries(compare_tables PRIVATE carlin_options)
target_compile_features(compare_tables PRIVATE cxx_std_20)
add_test(NAME "system: the same model run twice gives identical tables"
  COMMAND ${CMAKE_COMMAND} -DCARLIN=$<TARGET_FILE:carlin_command>
    -DMODEL=${PROJECT_SOURCE_DIR}/models/starter.yaml -DCOMPARE=$<TARGET_FILE:compare_tables>
    -DFOLDER=${system_folder}/twice -P ${system_source}/scripts/twice.cmake)
file(MAKE_DIRECTORY ${system_folder}/twice)
set_tests_properties("system: the same model run twice gives identical tables" PROPERTIES LABELS system)
add_cli_test(unknown_criterion EXIT 2 MATCH "unknown-criterion.yaml:13:3: error: criteria.joint_loads: there is no such criterion; known are .*unknown-criterion.yaml:14:3: error: criteria.joint_load: '50 kN'"
  ABSENT ${system_folder}/criterion ARGS check tests/system/unknown-criterion.yaml --into ${system_folder}/criterion)
add_cli_test(launch_is_judged EXIT 1 MATCH "met, [0-9]+ not met, [0-9]+ not judged \\(converted, judged\\)"
  ARGS check models/survey-launch.yaml --into ${system_folder}/launch)
add_cli_test(refine_says_how_far_each_check_moved EXIT 1 MATCH "Moved at half the mesh size.*member stress"
  ARGS check models/starter.yaml --into ${system_folder}/refined --refine --case "landing forward")
add_cli_test(tank_not_held_is_a_check_not_met EXIT 1 MATCH "NOT MET +tank held .*pulled"
  ARGS check tests/system/not-held.yaml --into ${system_folder}/not-held)
# too long under the sanitizers
set_tests_properties("system: launch_is_judged" "system: refine_says_how_far_each_check_moved"
  PROPERTIES LABELS "system;slow")
