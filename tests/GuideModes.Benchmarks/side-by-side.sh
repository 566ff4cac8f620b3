#!/usr/bin/env bash
# Times the SciPy baseline and our engines on the same guide, machine and hour, one thread each, and prints the ratios.
#
#   tests/GuideModes.Benchmarks/side-by-side.sh [baseline method ...]
#
# The baseline methods are sem_dense (the default, the fastest of them), sem_eigsh, fd2 and fd2_richardson; the last
# two take minutes. The baseline runs before and after our benchmarks: a virtual machine changes its pace.
set -euo pipefail

here=$(cd "$(dirname "$0")" && pwd)
python=/usr/bin/python3
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT

if ! "$python" -c 'import scipy' 2>/dev/null; then
  echo "The baseline needs $python with SciPy. On Debian or Ubuntu: apt-get install python3-scipy" >&2
  exit 1
fi

baseline() {
  # OpenBLAS picks its own kernel, and one thread.
  env -u OPENBLAS_CORETYPE -u OPENBLAS_L2_SIZE OMP_NUM_THREADS=1 "$python" "$here/baseline/baseline_planar.py" "$@"
}

methods=("$@")
[ ${#methods[@]} -gt 0 ] || methods=(sem_dense)

baseline "${methods[@]}" | tee "$work/baseline.jsonl"
dotnet run --project "$here" -c Release -- --filter '*' --artifacts "$work/artifacts"
baseline "${methods[@]}" | tee -a "$work/baseline.jsonl"

"$python" "$here/baseline/compare.py" "$work/baseline.jsonl" "$work"/artifacts/results/*-report-full.json
