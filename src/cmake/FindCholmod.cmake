# Defines cholmod::cholmod. SuiteSparse 5.12 ships no CMake config.
find_path(CHOLMOD_INCLUDE_DIR cholmod.h PATH_SUFFIXES suitesparse)
find_library(CHOLMOD_LIBRARY cholmod)
include(FindPackageHandleStandardArgs)
find_package_handle_standard_args(Cholmod DEFAULT_MSG CHOLMOD_LIBRARY CHOLMOD_INCLUDE_DIR)
if(Cholmod_FOUND AND NOT TARGET cholmod::cholmod)
  add_library(cholmod::cholmod UNKNOWN IMPORTED)
  set_target_properties(cholmod::cholmod PROPERTIES IMPORTED_LOCATION ${CHOLMOD_LIBRARY}
    INTERFACE_INCLUDE_DIRECTORIES ${CHOLMOD_INCLUDE_DIR})
endif()
