carlin_add_test(model_text_fuzz SOURCES ${CMAKE_CURRENT_SOURCE_DIR}/fuzz/model_text_fuzz.cpp
  LIBRARIES carlin::description LABELS fuzz)
