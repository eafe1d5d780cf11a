# Runs COMMAND (a list) and checks its exit status and that its output matches MATCH; CTest's own
# PASS_REGULAR_EXPRESSION would ignore the exit status. ABSENT: a path that must not exist afterwards.
execute_process(COMMAND ${COMMAND} WORKING_DIRECTORY ${FOLDER} RESULT_VARIABLE code
  OUTPUT_VARIABLE output ERROR_VARIABLE errors)
string(APPEND output "${errors}")
if(NOT code STREQUAL EXIT)
  message(FATAL_ERROR "exit status is ${code}, expected ${EXIT}; output:\n${output}")
endif()
if(NOT output MATCHES "${MATCH}")
  message(FATAL_ERROR "output does not match '${MATCH}':\n${output}")
endif()
if(ABSENT AND EXISTS "${ABSENT}")
  message(FATAL_ERROR "${ABSENT} was left behind")
endif()
