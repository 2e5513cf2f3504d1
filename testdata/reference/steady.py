"""Periodic steady states of diode-capacitor ladders, as a reference for tests.

    python3 steady.py                 solve every case of cases.json, write steady.json
    python3 steady.py NAME …          solve these afresh, keep the others
    python3 steady.py --check         solve again and compare with steady.json
    python3 steady.py --check --quick the first case of each topology only
    python3 steady.py --check --tight at a hundredth of the tolerance

Needs NumPy and SciPy. The method is written in shooting.py, the meaning of
every number in measure.py. Prints the seconds that each case took. Exit
status 1 when a case disagrees with what is stored or does not settle.
"""
import os
import sys

os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")  # the matrices are small
sys.dont_write_bytecode = True

import argparse
import json
import multiprocessing
import pathlib
import time

from comparison import compare, tidy, unbalanced
from equations import Equations
from layout import laid_out
from measure import measure
from shooting import Diverged, steady

HERE = pathlib.Path(__file__).parent
STORED = HERE / "steady.json"


def solve(job):
    case, tolerance, parts = job
    begin = time.perf_counter()
    try:
        eq = Equations(case)
        run, step, periods = steady(eq, tolerance, parts)
        result = measure(eq, run, step)
    except Diverged as why:
        return case, None, str(why)
    seconds = time.perf_counter() - begin
    return case, tidy(result), f"{seconds:.2f} s, {periods} periods, {len(run.h)} steps in the last"


def first_of_each(cases):
    seen = {}
    for case in cases:
        seen.setdefault(case["topology"], case)
    return list(seen.values())


def main():
    ask = argparse.ArgumentParser(description="Reference steady states of diode-capacitor ladders.")
    ask.add_argument("names", nargs="*", help="cases to solve; none: all")
    ask.add_argument("--check", action="store_true", help="compare with steady.json and write nothing")
    ask.add_argument("--quick", action="store_true", help="the first case of each topology only")
    ask.add_argument("--tight", action="store_true", help="a hundredth of the tolerance, four times the points")
    ask.add_argument("--jobs", type=int, default=os.cpu_count(), help="processes (default: %(default)s)")
    args = ask.parse_args()
    cases = json.loads((HERE / "cases.json").read_text())
    if unknown := set(args.names) - {c["name"] for c in cases}:
        ask.error("no such case: " + ", ".join(sorted(unknown)))
    stored = {e["case"]["name"]: e for e in json.loads(STORED.read_text())} if STORED.exists() else {}
    chosen = [c for c in cases if not args.names or c["name"] in args.names]
    if args.quick:
        chosen = first_of_each(chosen)
    effort = (1e-11, 800) if args.tight else (1e-9, 200)
    wrong = 0
    with multiprocessing.Pool(args.jobs) as pool:
        for case, result, note in pool.imap(solve, [(c, *effort) for c in chosen]):
            faults = list(unbalanced(case, result)) if result else ["failed"]
            if result and args.check:
                faults += compare(case, result, stored)
            elif not faults:
                stored[case["name"]] = {"case": case, "result": result}
            wrong += bool(faults)
            print(f"{case['name']:18} {note}", *faults, sep="\n    ", flush=True)
    if not args.check:
        STORED.write_text(laid_out([stored[c["name"]] for c in cases if c["name"] in stored]) + "\n")
    return 1 if wrong else 0


if __name__ == "__main__":
    sys.exit(main())
