# One interface target carries language level, warnings and sanitizers; every target of ours links it privately.
add_library(heatledger_options INTERFACE)
target_compile_features(heatledger_options INTERFACE cxx_std_20)
target_include_directories(heatledger_options INTERFACE "${CMAKE_SOURCE_DIR}")
target_compile_options(heatledger_options INTERFACE
  -Wall -Wextra -Wpedantic -Wshadow -Wconversion -Wno-sign-conversion -Wno-overlength-strings
  -ffp-contract=off  # the same digits natively and in WebAssembly
  $<$<BOOL:${HEATLEDGER_WERROR}>:-Werror>)
# GCC 12 at -O3 takes assigning to and joining strings for overlapping or uninitialised copies (gcc.gnu.org bug 105651);
# the other presets keep both warnings.
target_compile_options(heatledger_options INTERFACE
  $<$<AND:$<CXX_COMPILER_ID:GNU>,$<CONFIG:Release>>:-Wno-restrict;-Wno-maybe-uninitialized>)
if(HEATLEDGER_SANITIZE)
  target_compile_options(heatledger_options INTERFACE -fsanitize=address,undefined -fno-sanitize-recover=all -fno-omit-frame-pointer)
  target_link_options(heatledger_options INTERFACE -fsanitize=address,undefined)
endif()
if(HEATLEDGER_FUZZ)
  target_compile_options(heatledger_options INTERFACE -fsanitize=fuzzer-no-link,address,undefined)
  target_link_options(heatledger_options INTERFACE -fsanitize=address,undefined)
endif()

# Core never throws: built with exceptions off in every build so that all faces behave alike.
add_library(heatledger_core_options INTERFACE)
target_link_libraries(heatledger_core_options INTERFACE heatledger_options)
target_compile_options(heatledger_core_options INTERFACE -fno-exceptions)
target_compile_definitions(heatledger_core_options INTERFACE JSON_NOEXCEPTION EIGEN_DONT_VECTORIZE EIGEN_NO_DEBUG)

# Header-only libraries reach a cross build through a folder of links, never the whole system include path.
set(HEATLEDGER_HEADERS "${CMAKE_BINARY_DIR}/headers")
file(MAKE_DIRECTORY "${HEATLEDGER_HEADERS}")
foreach(link IN ITEMS nlohmann eigen3/Eigen)
  get_filename_component(name "${link}" NAME)
  if(NOT EXISTS "/usr/include/${link}")
    message(FATAL_ERROR "Missing /usr/include/${link}: run scripts/check.sh once, it installs what is missing.")
  endif()
  file(CREATE_LINK "/usr/include/${link}" "${HEATLEDGER_HEADERS}/${name}" SYMBOLIC)
endforeach()
add_library(heatledger_headers INTERFACE)
target_include_directories(heatledger_headers SYSTEM INTERFACE "${HEATLEDGER_HEADERS}")
