include(GNUInstallDirs)
include(CMakePackageConfigHelpers)

get_property(carlin_modules GLOBAL PROPERTY CARLIN_MODULES)
install(TARGETS carlin ${carlin_modules} EXPORT carlin-targets)
install(TARGETS carlin_command RUNTIME DESTINATION ${CMAKE_INSTALL_BINDIR})
install(DIRECTORY include/carlin DESTINATION ${CMAKE_INSTALL_INCLUDEDIR})
install(EXPORT carlin-targets NAMESPACE carlin::
  DESTINATION ${CMAKE_INSTALL_LIBDIR}/cmake/carlin)
configure_package_config_file(${PROJECT_SOURCE_DIR}/src/cmake/carlin-config.cmake.in
  ${PROJECT_BINARY_DIR}/carlin-config.cmake
  INSTALL_DESTINATION ${CMAKE_INSTALL_LIBDIR}/cmake/carlin)
write_basic_package_version_file(${PROJECT_BINARY_DIR}/carlin-config-version.cmake
  COMPATIBILITY SameMajorVersion)
install(FILES ${PROJECT_BINARY_DIR}/carlin-config.cmake
  ${PROJECT_BINARY_DIR}/carlin-config-version.cmake
  src/cmake/FindCholmod.cmake src/cmake/FindUdunits2.cmake
  DESTINATION ${CMAKE_INSTALL_LIBDIR}/cmake/carlin)
