#!/usr/bin/env bash
# Ratios against the short scripts beside this file, in one run: compare.sh EXECUTABLE. Ratios are what counts; times depend on the
# machine and on what else it does. What the scripts need stands in Scripts/README.md.
set -euo pipefail
matched=$(realpath "$1")
scripts=$(dirname "$(realpath "$0")")/Scripts
rounds=${ROUNDS:-5}
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT

# The least wall time of several rounds, in seconds.
least() {
  python3 - "$rounds" "$@" <<'PY'
import subprocess, sys, time
best = 1e9
for _ in range(int(sys.argv[1])):
    start = time.perf_counter()
    subprocess.run(sys.argv[2:], check=True, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)
    best = min(best, time.perf_counter() - start)
print("%.3f" % best)
PY
}

# The seconds that a script prints for its kernel, per endpoint where it was run on some only.
kernel() { "$@" | awk '/kernel seconds/ { n = $NF; if (n ~ /^[0-9]+$/ && NF > 3) printf "%.6f", $3 / n; else printf "%.6f", $3 }'; }

# A step of our run, in seconds, as the manifest has it.
step() { python3 -c 'import json, sys; print("%.6f" % (json.load(open(sys.argv[1]))["execution"]["steps_milliseconds"][sys.argv[2]] / 1000))' "$1/out/run.json" "$2"; }

# Seconds per endpoint that our threads together needed for testing 500 endpoints, reading not counted as in the scripts' kernels:
# the time of all threads over their number.
evaluation() { python3 -c 'import json, sys; e = json.load(open(sys.argv[1]))["execution"]; print("%.6f" % (e["evaluation_thread_milliseconds"] / e["threads"] / 1000 / 500))' "$1/out/run.json"; }
least_evaluation() { for _ in $(seq "$rounds"); do "$matched" analyze "$1/study.yaml" --quiet; evaluation "$1"; done | sort -n | head -1; }

ratio() { awk -v theirs="$1" -v ours="$2" 'BEGIN { printf "%.1f", theirs / ours }'; }
row() { printf '%-52s %10s %10s %8s\n' "$@"; }

row "study and what is compared" "script s" "matched s" "ratio"
for kind in pairs-small maxt sets visits; do /usr/bin/python3 "$scripts/make_data.py" $kind "$work/$kind"; done

sed 's/, signed-rank//' "$work/pairs-small/study.yaml" > "$work/pairs-small/t.yaml"
theirs=$(least Rscript "$scripts/pairs_r.R" "$work/pairs-small" t)
ours=$(least "$matched" analyze "$work/pairs-small/t.yaml" --quiet)
row "pairs-small, paired-t, whole process, base R" "$theirs" "$ours" "$(ratio "$theirs" "$ours")"
theirs=$(least Rscript "$scripts/pairs_r.R" "$work/pairs-small" both)
ours=$(least "$matched" analyze "$work/pairs-small/study.yaml" --quiet)
row "pairs-small, with signed-rank, whole process, base R" "$theirs" "$ours" "$(ratio "$theirs" "$ours")"
theirs=$(least /usr/bin/python3 "$scripts/pairs_scipy.py" "$work/pairs-small" both)
row "pairs-small, with signed-rank, whole process, SciPy" "$theirs" "$ours" "$(ratio "$theirs" "$ours")"
row "matched --version" "-" "$(least "$matched" --version)" "-"

for precision in float64 float32; do
  arguments=("$work/maxt"); [ $precision = float32 ] && arguments+=(float32)
  theirs=$(for _ in $(seq "$rounds"); do env -u OPENBLAS_CORETYPE -u OPENBLAS_L2_SIZE /usr/bin/python3 "$scripts/maxt_numpy.py" "${arguments[@]}"; done | awk '{ print $3 }' | sort -n | head -1)
  ours=$(for _ in $(seq "$rounds"); do "$matched" analyze "$work/maxt/study.yaml" --quiet; step "$work/maxt" resampling; done | sort -n | head -1)
  row "maxt, kernel, NumPy $precision" "$theirs" "$ours" "$(ratio "$theirs" "$ours")"
done

theirs=$(kernel Rscript "$scripts/sets_r.R" "$work/sets" 20)
ours=$(least_evaluation "$work/sets")
row "sets, conditional-logistic, kernel per endpoint, R" "$theirs" "$ours" "$(ratio "$theirs" "$ours")"

theirs=$(kernel Rscript "$scripts/visits_r.R" "$work/visits" 100)
ours=$(least_evaluation "$work/visits")
row "visits, mixed-model, kernel per endpoint, R" "$theirs" "$ours" "$(ratio "$theirs" "$ours")"
