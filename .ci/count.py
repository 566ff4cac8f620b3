#!/usr/bin/env python3
"""Sums the tests of all projects from their trx files and prints the count alone on the last line.

Usage: count.py RESULTS_DIRECTORY TEST_PROJECTS TEST_EXIT_STATUS
Fails if the test run failed, if a test failed, if none ran, if a project left no results, or if a test was skipped for
want of a browser.
"""
import pathlib
import sys
import xml.etree.ElementTree as tree

TRX = "{http://microsoft.com/schemas/VisualStudio/TeamTest/2010}"
SKIPPED = ("NotExecuted", "NotRunnable", "Inconclusive", "Pending")


def results(directory):
    for path in sorted(pathlib.Path(directory).rglob("*.trx")):
        for result in tree.parse(path).iter(TRX + "UnitTestResult"):
            yield result.get("testName"), result.get("outcome"), "".join(result.itertext())


def main(directory, projects, status):
    passed, failed, skipped, wrong = 0, 0, 0, []
    for name, outcome, text in results(directory):
        if outcome == "Passed":
            passed += 1
        elif outcome in SKIPPED:
            skipped += 1
            print(f"skipped: {name}: {text.strip()}")
            if "chromium" in text.lower() or "browser" in text.lower():
                wrong.append(f"{name} was skipped for want of a browser.")
        else:
            failed += 1
            print(f"failed: {name}")

    files = len(list(pathlib.Path(directory).rglob("*.trx")))
    if files != projects:
        wrong.append(f"{projects} test projects left {files} result files.")
    if passed + failed == 0:
        wrong.append("No test ran.")
    if status and not failed:
        wrong.append(f"The test run ended with status {status}, though no test failed.")

    for sentence in wrong:
        print(sentence)
    sys.stdout.flush()
    print(f"{passed} passed, {failed} failed" + (f", {skipped} skipped" if skipped else ""))
    return 1 if failed or wrong or status else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1], int(sys.argv[2]), int(sys.argv[3])))
