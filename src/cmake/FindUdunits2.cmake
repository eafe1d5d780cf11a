# Defines udunits2::udunits2. Debian's package ships no CMake config.
find_path(UDUNITS2_INCLUDE_DIR udunits2.h)
find_library(UDUNITS2_LIBRARY udunits2)
include(FindPackageHandleStandardArgs)
find_package_handle_standard_args(Udunits2 DEFAULT_MSG UDUNITS2_LIBRARY UDUNITS2_INCLUDE_DIR)
if(Udunits2_FOUND AND NOT TARGET udunits2::udunits2)
  add_library(udunits2::udunits2 UNKNOWN IMPORTED)
  set_target_properties(udunits2::udunits2 PROPERTIES IMPORTED_LOCATION ${UDUNITS2_LIBRARY}
    INTERFACE_INCLUDE_DIRECTORIES ${UDUNITS2_INCLUDE_DIR})
endif()
