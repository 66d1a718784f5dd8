# A compiler cache makes the second build of any preset a matter of seconds; used when present, never required.
find_program(HEATLEDGER_CCACHE ccache)
if(HEATLEDGER_CCACHE AND NOT CMAKE_CXX_COMPILER_LAUNCHER)
  set(CMAKE_CXX_COMPILER_LAUNCHER "${HEATLEDGER_CCACHE}")
endif()
