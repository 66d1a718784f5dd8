# Script mode: writes OUTPUT, a C++ file that holds INPUT as one string_view.
file(READ "${INPUT}" text)
file(WRITE "${OUTPUT}" "#include <string_view>\nnamespace ${NAMESPACE} {\nextern const std::string_view ${NAME};\nconst std::string_view ${NAME} = R\"~~~(${text})~~~\";\n}  // namespace ${NAMESPACE}\n")
