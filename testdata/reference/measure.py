"""What one closed period says: means, extremes, currents and powers."""
import numpy as np


def measure(eq, run, step):
    """The numbers of a closed period, named with their units.

    Capacitor voltages are those between the terminals, series resistance
    included. A diode's current is what it conducts and, with stored charge,
    what fills and empties that; the current of the depletion capacitance is
    left out. Its average is that of the conducted part alone.
    """
    mean = lambda y: run.integral(y) / eq.period
    rms = lambda y: np.sqrt(mean(y * y))
    dx = eq.slope(run.t, run.x)
    wave = eq.wave.at(run.t)[..., None]
    source = run.x @ eq.flow.T + wave * eq.emf
    out = run.x @ eq.output
    load = eq.case["load"]
    drawn = load.get("current", 0) + (out / load["resistance"] if load.get("resistance") else 0)
    return {
        "output": {"mean_v": mean(out), "min_v": out.min(), "max_v": out.max(), "ripple_v": np.ptp(out)},
        "capacitors": capacitors(eq, run, dx, mean, rms),
        "diodes": diodes(eq, run, dx, mean, rms),
        "source": [{"rms_a": a} for a in rms(source)],
        "input_w": mean((wave * eq.source["peak"] * eq.phase * source).sum(-1)),
        "load_w": mean(out * drawn),
        "residual_v": np.abs(run.gap()[: len(eq.names)]).max(),
        "last_step_v": step,
    }


def capacitors(eq, run, dx, mean, rms):
    v = run.x @ eq.caps
    c, _, _, _ = eq.capacitances(run.x)
    i = (c * (dx @ eq.store))[..., : v.shape[-1]]  # the strays come after
    columns = {"mean_v": mean(v), "max_v": v.max((0, 1)), "min_v": v.min((0, 1)), "rms_a": rms(i)}
    return table("C", columns)


def diodes(eq, run, dx, mean, rms):
    v = run.x @ eq.diode
    conducted, g, _ = eq.diodes.current(v)
    i = conducted + eq.diodes.transit * g * (dx @ eq.diode)
    columns = {"inverse_v": np.maximum(0, -v.min((0, 1))), "average_a": mean(conducted),
               "peak_a": i.max((0, 1)), "rms_a": rms(i)}
    return table("D", columns)


def table(letter, columns):
    """One entry for each part from a column for each quantity."""
    rows = zip(*columns.values())
    return [{"ref": f"{letter}{k}", **dict(zip(columns, row))} for k, row in enumerate(rows, 1)]
