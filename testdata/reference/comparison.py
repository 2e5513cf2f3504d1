"""Results against the stored ones, and against what every circuit must keep."""

# Greatest relative difference that --check lets pass, by name.
ALLOWED = {"mean_v": 1e-5, "min_v": 1e-5, "max_v": 1e-5, "ripple_v": 1e-3, "inverse_v": 1e-4,
           "average_a": 1e-4, "peak_a": 2e-3, "rms_a": 2e-3, "input_w": 1e-4, "load_w": 2e-5}
CLOSED = {"residual_v", "last_step_v"}  # compared with the peak, not with what is stored


def tidy(value, name=""):
    """Eight significant digits; two for what says how well the period closes."""
    if isinstance(value, dict):
        return {k: tidy(v, k) for k, v in value.items()}
    if isinstance(value, list):
        return [tidy(v) for v in value]
    return value if isinstance(value, str) else float(f"{value:.{2 if name in CLOSED else 8}g}")


def differences(got, want, peak, path=""):
    """Every number of got that lies too far from want."""
    if isinstance(want, dict):
        if got.keys() != want.keys():
            yield f"{path}: other names"
        for key in sorted(want.keys() & got.keys()):
            yield from differences(got[key], want[key], peak, f"{path}.{key}")
    elif isinstance(want, list):
        if len(got) != len(want):
            yield f"{path}: {len(got)} entries, not {len(want)}"
        for g, w in zip(got, want):
            yield from differences(g, w, peak, f"{path}[{w.get('ref', '')}]")
    elif isinstance(want, str):
        if got != want:
            yield f"{path}: {got}, not {want}"
    elif (name := path.split(".")[-1]) in CLOSED:
        if got > 1e-6 * peak:
            yield f"{path}: {got:g} V is not closed"
    elif abs(got - want) > ALLOWED[name] * abs(want) + 1e-9 * (peak if name.endswith("_v") else 0):
        yield f"{path}: {got:.8g}, stored {want:.8g}, {got / want - 1:+.1e}" if want else f"{path}: {got:.8g}, stored 0"


def compare(case, result, stored):
    """What is wrong with a result, in lines."""
    want = stored.get(case["name"])
    if want is None:
        return ["nothing is stored"]
    if want["case"] != case:
        return ["the stored case is another: solve it afresh"]
    return list(differences(result, want["result"], case["source"]["peak"]))


def unbalanced(case, result):
    """Diodes whose mean current is not the load's: in a closed period each diode
    passes the load's charge, half of it where two share the work."""
    load = case["load"]
    mean = load.get("current", 0)
    if load.get("resistance"):
        mean += result["output"]["mean_v"] / load["resistance"]
    share = 0.5 if case["topology"] == "full-wave" else 1
    for diode in result["diodes"]:
        if abs(diode["average_a"] - share * mean) > 1e-6 * mean:
            yield f"{diode['ref']} passes {diode['average_a']:.8g} A, not {share * mean:.8g}"
