#!/usr/bin/python3
"""Prints our median times beside the baseline's best one at 1e-10, as rows of a Markdown table.

Usage: compare.py baseline.jsonl report-full.json
The first file holds the lines that baseline_planar.py prints, the second is BenchmarkDotNet's full JSON export.
"""
import json
import sys

TARGET = 1e-10
COMPARED = {"TransferMatrixTwentyModes": 3.0, "WkbTwentyModes": 10.0}


def best_baseline(path):
    with open(path, encoding="utf-8") as lines:
        runs = [json.loads(line) for line in lines if line.strip()]
    reached = [run for run in runs if run["target"] == TARGET and run["medianSeconds"]]
    if not reached:
        sys.exit(f"No baseline method reached {TARGET:g}.")
    return min(reached, key=lambda run: run["medianSeconds"])


def medians(path):
    with open(path, encoding="utf-8") as report:
        benchmarks = json.load(report)["Benchmarks"]
    missing = [b["Method"] for b in benchmarks if not b.get("Statistics")]
    if missing or not benchmarks:
        sys.exit("These benchmarks gave no time: " + (", ".join(missing) or "all"))
    return {b["Method"]: b["Statistics"]["Median"] * 1e-6 for b in benchmarks}


def main(baseline_path, report_path):
    baseline = best_baseline(baseline_path)
    milliseconds = baseline["medianSeconds"] * 1e3
    print("| what | median, ms | times as fast as the baseline | asked |")
    print("|---|---|---|---|")
    print(f"| baseline, {baseline['method']}, {baseline['modes']} n_eff to {TARGET:g} | {milliseconds:.3f} | 1 | |")
    for method, ours in medians(report_path).items():
        asked = COMPARED.get(method)
        ratio, wanted = (f"{milliseconds / ours:.1f}", f"≥ {asked:g}") if asked else ("", "")
        print(f"| {method} | {ours:.3f} | {ratio} | {wanted} |")


if __name__ == "__main__":
    if len(sys.argv) != 3:
        sys.exit(__doc__)
    main(*sys.argv[1:])
