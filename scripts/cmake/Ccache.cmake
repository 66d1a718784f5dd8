# A compiler cache makes the second build of any preset a matter of seconds; used when present, never required.
# Paths are hashed relative to the source tree, so that another clone finds what this one has compiled.
find_program(HEATLEDGER_CCACHE ccache)
if(HEATLEDGER_CCACHE AND NOT CMAKE_CXX_COMPILER_LAUNCHER)
  set(CMAKE_CXX_COMPILER_LAUNCHER
    "${CMAKE_COMMAND}" -E env "CCACHE_BASEDIR=${CMAKE_SOURCE_DIR}" CCACHE_NOHASHDIR=1 "${HEATLEDGER_CCACHE}")
endif()
