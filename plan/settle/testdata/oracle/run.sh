#!/bin/sh
# Asks a learning solver for the answers in results.csv: sh run.sh DATA OUT [LIMIT_S]
# DATA is a folder with the jobs' data (go test ./plan/settle -run TestOracle -oracle DATA), OUT the file that is
# written. The solver is the one inside the npm package minizinc 4.5.1 (npm install minizinc@4.5.1; set MINIZINC_DIST
# to its dist folder), run by ../../../../cmd/sailbench/sidebyside/wasm.mjs.
here=$(dirname "$0")
echo "job,status,finish" >"$2"
for d in "$1"/*.dzn; do
  text=$(node "$here/../../../../cmd/sailbench/sidebyside/wasm.mjs" org.minizinc.chuffed "${3:-60}" "$here/job.mzn" "$d" -f)
  finish=$(printf '%s\n' "$text" | sed -n 's/.*"default":"finish=\([0-9]*\).*/\1/p' | tail -1)
  case $text in
  *UNSATISFIABLE*) status=infeasible finish= ;;
  *==========* | *OPTIMAL_SOLUTION*) status=optimal ;;
  *finish=*) status=feasible ;;
  *) status=unknown ;;
  esac
  echo "$(basename "$d" .dzn),$status,$finish" | tee -a "$2"
done
