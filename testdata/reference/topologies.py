"""The circuit forms as lists of branches between named nodes.

A builder returns a Netlist. Node "0" is the reference node. A capacitor is
(positive node, negative node), a diode (anode, cathode), a winding end (driven
node, return node, phase). Capacitors and diodes stand in the order of their
reference designators.
"""

GROUND = "0"


class Netlist:
    def __init__(self, *ends):
        """Ends are (node, return node, phase)."""
        self.ends = list(ends)
        self.nodes = [end[0] for end in ends]
        self.capacitors, self.diodes = [], []
        self.plus = self.minus = GROUND

    def node(self, name):
        self.nodes.append(name)
        return name

    def cascade(self, source, foot, stages, mark="", negative=False):
        """Half-wave stages on a foot node; returns the top of the smoothing column."""
        turn = (lambda a, b: (b, a)) if negative else (lambda a, b: (a, b))
        coupling, smoothing = source, foot
        for k in range(1, stages + 1):
            c, s = self.node(f"{mark}c{k}"), self.node(f"{mark}s{k}")
            self.capacitors += [turn(c, coupling), turn(s, smoothing)]
            self.diodes += [turn(smoothing, c), turn(c, s)]
            coupling, smoothing = c, s
        return smoothing


def half_wave(stages):
    net = Netlist(("source", GROUND, 1))
    net.plus = net.cascade("source", GROUND, stages)
    return net


def full_wave(stages):
    net = Netlist(("source a", GROUND, 1), ("source b", GROUND, -1))
    a, b, s = "source a", "source b", GROUND
    for k in range(1, stages + 1):
        ak, bk, sk = net.node(f"a{k}"), net.node(f"b{k}"), net.node(f"s{k}")
        net.capacitors += [(ak, a), (bk, b), (sk, s)]
        net.diodes += [(s, ak), (s, bk), (ak, sk), (bk, sk)]
        a, b, s = ak, bk, sk
    net.plus = s
    return net


def bridge_doubler(stages):
    """The reference node is the negative output, so that the winding floats."""
    assert stages == 1, "a bridge doubler has one stage"
    net = Netlist(("end", "middle", 1))
    middle, net.plus = net.node("middle"), net.node("plus")
    net.capacitors = [(net.plus, middle), (middle, GROUND)]
    net.diodes = [("end", net.plus), (GROUND, "end")]
    return net


def parallel_fed(stages):
    net = Netlist(("source", GROUND, 1))
    below = GROUND
    for k in range(1, stages + 1):
        c, s = net.node(f"c{k}"), net.node(f"s{k}")
        net.capacitors += [(c, "source"), (s, GROUND)]
        net.diodes += [(below, c), (c, s)]
        below = s
    net.plus = below
    return net


def odd_multiple(stages):
    net = Netlist(("source", GROUND, 1))
    foot = net.node("s0")
    net.capacitors = [(foot, GROUND)]
    net.diodes = [("source", foot)]
    net.plus = net.cascade("source", foot, stages)
    return net


def bipolar(stages):
    net = Netlist(("source", GROUND, 1))
    net.plus = net.cascade("source", GROUND, stages, "+")
    net.minus = net.cascade("source", GROUND, stages, "-", negative=True)
    return net


BUILDERS = {
    "half-wave": half_wave,
    "full-wave": full_wave,
    "bridge-doubler": bridge_doubler,
    "parallel-fed": parallel_fed,
    "odd-multiple": odd_multiple,
    "bipolar": bipolar,
}
