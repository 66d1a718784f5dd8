#!/usr/bin/env bash
# Fails on an include that points down the list of rooms, on Eigen or JSON in a header, and on a face that reaches
# past core/page.
set -euo pipefail
cd "$(dirname "$0")/../.."
rooms=(base uncertainty units molecule facts estimate thermo balance step mixing burning dosing safety document file page)
bad=0
for i in "${!rooms[@]}"; do
  for ((k = i + 1; k < ${#rooms[@]}; k++)); do
    if git grep -nE "#include \"core/${rooms[k]}/" -- "core/${rooms[i]}"; then
      echo "core/${rooms[i]} stands above core/${rooms[k]} and must not include it"
      bad=1
    fi
  done
done
if git grep -nE '#include [<"](Eigen|nlohmann)/' -- 'core/*.hpp'; then
  echo "Eigen and JSON stay inside .cpp files"
  bad=1
fi
if git grep -nE '#include "core/' -- desktop wasm | grep -vE '#include "core/(page|base)/'; then
  echo "a face talks to core/page only"
  bad=1
fi
if git grep -nE '#include "(desktop|wasm|tests)/' -- core; then
  echo "core includes nothing of the faces or tests"
  bad=1
fi
exit $bad
