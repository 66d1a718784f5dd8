# heatledger_embed(TARGET core_facts NAME compounds FILE tables/compounds.tsv NAMESPACE heatledger::facts::tables)
# Compiles a text file into the target as `extern const std::string_view NAME` of that namespace.
# Raw string literals keep the table readable in the generated file and compile faster than number lists.
function(heatledger_embed)
  cmake_parse_arguments(EMBED "" "TARGET;NAME;FILE;NAMESPACE" "" ${ARGN})
  set(input "${CMAKE_CURRENT_SOURCE_DIR}/${EMBED_FILE}")
  set(output "${CMAKE_CURRENT_BINARY_DIR}/embedded_${EMBED_NAME}.cpp")
  add_custom_command(
    OUTPUT "${output}"
    COMMAND ${CMAKE_COMMAND} -DINPUT=${input} -DOUTPUT=${output} -DNAME=${EMBED_NAME} -DNAMESPACE=${EMBED_NAMESPACE}
            -P "${CMAKE_SOURCE_DIR}/scripts/cmake/embed_text.cmake"
    DEPENDS "${input}" "${CMAKE_SOURCE_DIR}/scripts/cmake/embed_text.cmake"
    VERBATIM)
  target_sources(${EMBED_TARGET} PRIVATE "${output}")
endfunction()
