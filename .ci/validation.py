#!/usr/bin/env python3
"""Sums up the rows of a validation run: one line per family of checks, with the largest deviation reached.

Usage: python3 .ci/validation.py rows.md
The rows are what the tests write when GUIDEMODES_WRITE_VALIDATION names a file; docs/validation.md tells how.
"""
import re
import sys

# What is left of a check's name once its numbers are gone decides its family; the first pattern that fits wins.
FAMILIES = [
    (r"^s\d\d-.* n_eff$", "reference guides: n_eff"),
    (r"^s\d\d-.* n_g$", "reference guides: n_g"),
    (r"^s\d\d-.* share \d+$", "reference guides: share of power per region"),
    (r"^s\d\d-.* E\(", "reference guides: field samples, µm^−½"),
    (r"^slab .* n_eff$", "physical slabs, TE and TM: n_eff"),
    (r"^slab .* n_g$", "physical slabs, TE and TM: n_g"),
    (r"^power law", "singular power laws, TE and TM: n_eff"),
    (r"^random guide", "random guides, TE and TM: n_eff"),
    (r"^(.*?),? ?.*cutoff V", None),
]


def family(check):
    for pattern, name in FAMILIES:
        if re.match(pattern, check):
            if name:
                return name
            return check.split(",")[0] + ": cutoff V"
    kind = re.search(r"(\bb\b|n_eff|w²|\bE\b|1/γ) of|(n_eff|n_g|1/γ)$", check)
    head = re.sub(r" (TE|TM)\d+.*$", "", check.split(",")[0])
    head = re.sub(r"^s\d\d-[a-z0-9-]+", "reference guides", head)
    return head + (": " + (kind.group(1) or kind.group(2)) if kind else "")


def main(path):
    groups = {}
    for line in open(path, encoding="utf-8"):
        cells = [cell.strip() for cell in re.split(r"(?<!\\)\|", line)[1:-1]]
        if len(cells) != 5:
            continue
        check, source, _, off, allowed = cells
        key = (family(check), source)
        rows = groups.setdefault(key, [0, 0.0, 0.0, ""])
        rows[0] += 1
        rows[2] = max(rows[2], float(allowed))
        if float(off) >= rows[1]:
            rows[1], rows[3] = float(off), check
    print("| checks | source | values | largest deviation | at | largest allowed |")
    print("|---|---|---|---|---|---|")
    for (name, source), (count, off, allowed, where) in sorted(groups.items()):
        print(f"| {name} | {source} | {count} | {off:.1e} | {where} | {allowed:.1e} |")


if __name__ == "__main__":
    main(sys.argv[1])
