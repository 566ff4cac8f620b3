#!/usr/bin/python3
"""Prints our times beside the baseline's at 1e-10, as rows of a Markdown table.

Usage: compare.py baseline.jsonl report-full.json
The first file holds the lines that baseline_planar.py prints, run before and after; the second is BenchmarkDotNet's full JSON export.
A virtual machine may change its pace by a factor of two within minutes, so like is compared with like: least with least, and the
median of ours with the mean of the baseline's runs before and after.
"""
import json
import statistics
import sys

TARGET = 1e-10
COMPARED = {"TransferMatrixTwentyModes": 3.0, "WkbTwentyModes": 10.0}


def baseline_runs(path):
    with open(path, encoding="utf-8") as lines:
        runs = [json.loads(line) for line in lines if line.strip()]
    reached = [run for run in runs if run["target"] == TARGET and run["medianSeconds"]]
    if not reached:
        sys.exit(f"No baseline method reached {TARGET:g}.")
    best = min(reached, key=lambda run: run["medianSeconds"])["method"]
    return best, [run["medianSeconds"] * 1e3 for run in reached if run["method"] == best]


def our_times(path):
    with open(path, encoding="utf-8") as report:
        benchmarks = json.load(report)["Benchmarks"]
    missing = [b["Method"] for b in benchmarks if not b.get("Statistics")]
    if missing or not benchmarks:
        sys.exit("These benchmarks gave no time: " + (", ".join(missing) or "all"))
    return {b["Method"]: (b["Statistics"]["Min"] * 1e-6, b["Statistics"]["Median"] * 1e-6) for b in benchmarks}


def main(baseline_path, report_path):
    method, runs = baseline_runs(baseline_path)
    least, middle = min(runs), statistics.mean(runs)
    print("| what | least, ms | median, ms | times as fast, least | times as fast, median | asked |")
    print("|---|---|---|---|---|---|")
    print(f"| baseline, {method}, {len(runs)} runs, n_eff to {TARGET:g} | {least:.3f} | {middle:.3f} | 1 | 1 | |")
    for name, (ours_least, ours_median) in our_times(report_path).items():
        asked = COMPARED.get(name)
        ratios = (f"{least / ours_least:.1f}", f"{middle / ours_median:.1f}", f"≥ {asked:g}") if asked else ("", "", "")
        print(f"| {name} | {ours_least:.3f} | {ours_median:.3f} | {ratios[0]} | {ratios[1]} | {ratios[2]} |")


if __name__ == "__main__":
    if len(sys.argv) != 3:
        sys.exit(__doc__)
    main(*sys.argv[1:])
