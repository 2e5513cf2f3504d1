"""Tables in closed form, or nearly so, as a reference for tests.

    python3 closed.py           work everything out, write closed.json
    python3 closed.py --check   work it out again and compare with closed.json

Every number of closed.json is worked out here; none is copied. What earlier
work printed of the same tables stands in PRINTED with its source and is
compared, digit for digit, on every run. An omega_rc of null is the limit of large
capacitors. Exit status 1 on disagreement.
"""
import os
import sys

os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")  # the matrices are small
sys.dont_write_bytecode = True

import argparse
import json
import pathlib

import numpy as np
from scipy.optimize import brentq

import peakrectifier
from layout import laid_out
from topologies import BUILDERS, GROUND

STORED = pathlib.Path(__file__).parent / "closed.json"
RATIOS = (0.001, 0.01, 0.05, 0.1, 0.2)

STAGES = (2, 4, 8, 10)

# What earlier work gave, in its own digits; keys are the arguments.
PRINTED = {
    # Derived for this project: topology, stages, R_s/R.
    "conduction": {("half-wave", 1, 0.01): "1.70581", ("half-wave", 2, 0.0025): "3.41162",
                   ("half-wave", 2, 0.01): "2.72987", ("half-wave", 3, 0.001): "5.17128",
                   ("full-wave", 2, 0.0025): "3.61414", ("full-wave", 2, 0.01): "3.12190"},
    # Derived for this project: R_s/R to I_peak/I_mean and I_rms/I_mean.
    "pulse": {0.0005: "28.23 4.751", 0.001: "22.46 4.238", 0.005: "13.30 3.261", 0.01: "10.68 2.920", 0.02: "8.62 2.624",
              0.05: "6.60 2.294", 0.1: "5.49 2.091", 0.2: "4.67 1.926", 0.35: "4.18 1.821"},
    # ωRC (none: without bound) to the output at each of RATIOS. The circuits of
    # O. H. Schade, Proc. IRE 31 (1943) 341; values from an earlier integration at
    # 400,000 steps per period, not read from his graphs.
    "greinacher": {5: "0.7644 0.7620 0.7401 0.6963 0.6010", 10: "1.0893 1.0827 1.0070 0.8907 0.7047",
                   20: "1.3984 1.3772 1.1872 0.9896 0.7439", 50: "1.6973 1.6150 1.2716 1.0263 0.7564",
                   100: "1.8286 1.6799 1.2860 1.0320 0.7583", 1000: "1.9292 1.7055 1.2909 1.0339 0.7589",
                   None: "1.9309 1.7058 1.2909 1.0339 0.7589"},
    "bridge": {10: "1.3681 1.3431 1.1772 0.9879 0.7446", 50: "1.7986 1.6720 1.2852 1.0319 0.7583",
               100: "1.8808 1.6969 1.2895 1.0334 0.7588"},
    # x = 2n√(C_s/C) to tanh(x)/x. E. Everhart, P. Lorrain, Rev. Sci. Instrum. 24
    # (1953) 221 (formula from memory).
    "line": {0.1: ".9967", 0.2: ".9869", 0.5: ".9242", 1: ".7616", 2: ".4820"},
    # C_s/C to the factor at each of STAGES. Derived for this project.
    "ladder": {0.001: ".9926 .9752 .9157 .8771", 0.005: ".9640 .8886 .6968 .6086",
               0.01: ".9307 .8022 .5500 .4593", 0.05: ".7337 .4752 .2496 .2000"},
}


def angle(load):
    """Half the conduction angle: tan θ − θ = load."""
    return brentq(lambda a: np.tan(a) - a - load, 1e-9, np.pi / 2 - 1e-12, xtol=1e-15)


def conduction(topology, stages, ratio):
    """Output in units of the peak, all capacitors large, ideal diodes, R_s in
    each winding end, ratio = R_s/R: 2n·cos θ."""
    load = (2 if topology == "half-wave" else 1) * np.pi * stages**2 * ratio
    return 2 * stages * np.cos(angle(load))


def pulse(ratio):
    """Peak and RMS current of a half-wave rectifier's diode in units of the load
    current, large capacitor: i = (V/R_s)(cos φ − cos θ) for |φ| < θ."""
    a = angle(np.pi * ratio)
    mean = (np.sin(a) - a * np.cos(a)) / np.pi
    square = (a * (1 + 2 * np.cos(a) ** 2) - 3 * np.sin(a) * np.cos(a)) / (2 * np.pi)
    return (1 - np.cos(a)) / mean, np.sqrt(square) / mean


def ladder(stages, share):
    """Unloaded output of a half-wave cascade in units of 2nV when every diode has
    share·C across it and every capacitor is C: the swing of the capacitive
    network across each diode, summed, as a diode holds its swing as direct voltage."""
    net = BUILDERS["half-wave"](stages)
    nodes = net.nodes
    m = np.zeros((len(nodes), len(nodes)))
    for branches, c in ((net.capacitors, 1), (net.diodes, share)):
        for a, b in branches:
            row = np.array([float(n == a) - float(n == b) for n in nodes])
            m += c * np.outer(row, row)
    swing = dict(zip(nodes, [1, *np.linalg.solve(m[1:, 1:], -m[1:, 0])])) | {GROUND: 0}
    return sum(abs(swing[a] - swing[b]) for a, b in net.diodes) / (2 * stages)


def doubler(kind, c, ratio):
    """Output of a doubler in units of the peak; c = ωRC, none for the limit of
    large capacitors, which both kinds share."""
    return conduction("half-wave", 1, ratio) if c is None else kind(c, ratio).mean()


def doublers(kind, c):
    return [{"omega_rc": c, "source_over_load": r, "output_over_peak": doubler(kind, c, r)} for r in RATIOS]


# For one key of PRINTED, the rows of closed.json: arguments, then values.
WORK = {
    "conduction": lambda key: [dict(zip(("topology", "stages", "source_over_load", "output_over_peak"),
                                        (*key, conduction(*key))))],
    "pulse": lambda r: [dict(zip(("source_over_load", "peak_over_mean", "rms_over_mean"), (r, *pulse(r))))],
    "greinacher": lambda c: doublers(peakrectifier.greinacher, c),
    "bridge": lambda c: doublers(peakrectifier.bridge, c),
    "line": lambda x: [{"x": x, "output_over_ideal": np.tanh(x) / x}],
    "ladder": lambda c: [{"diode_over_capacitor": c, "stages": n, "output_over_ideal": ladder(n, c)} for n in STAGES],
}
VALUES = ("output_over_peak", "peak_over_mean", "rms_over_mean", "output_over_ideal")


def tables():
    """Every table with eight significant digits."""
    short = lambda row: {k: float(f"{v:.8g}") if k in VALUES else v for k, v in row.items()}
    return {name: [short(row) for key in PRINTED[name] for row in work(key)] for name, work in WORK.items()}


def misprints(found):
    """Where a table differs from what was printed of it by more than rounding."""
    for name, rows in found.items():
        words = " ".join(PRINTED[name].values()).split()
        values = [row[v] for row in rows for v in VALUES if v in row]
        for value, word in zip(values, words, strict=True):
            if abs(value - float(word)) > 0.501 * 10 ** -len(word.split(".")[1]):
                yield f"{name}: {value:.8g}, printed {word}"


def changes(found, stored):
    """Where a table differs from the stored one."""
    if found.keys() != stored.keys():
        yield "other tables are stored"
    for name in sorted(found.keys() & stored.keys()):
        for row, old in zip(found[name], stored[name], strict=True):
            if row.keys() != old.keys() or any(
                    abs(row[k] / old[k] - 1) > 1e-6 if k in VALUES else row[k] != old[k] for k in row):
                yield f"{name}: {row}, stored {old}"


def main():
    ask = argparse.ArgumentParser(description="Reference tables in closed form.")
    ask.add_argument("--check", action="store_true", help="compare with closed.json and write nothing")
    args = ask.parse_args()
    found = tables()
    wrong = list(misprints(found))
    if args.check:
        wrong += changes(found, json.loads(STORED.read_text()))
    else:
        STORED.write_text(laid_out(found) + "\n")
    print(*wrong, f"{sum(map(len, found.values()))} rows, {len(wrong)} differ", sep="\n")
    return 1 if wrong else 0


if __name__ == "__main__":
    sys.exit(main())
