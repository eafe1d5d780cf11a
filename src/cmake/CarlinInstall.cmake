include(GNUInstallDirs)
install(TARGETS carlin_command RUNTIME DESTINATION ${CMAKE_INSTALL_BINDIR})
