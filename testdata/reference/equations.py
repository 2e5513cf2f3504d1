"""A case as the ordinary differential equations M(x)·dx/dt = r(x, t).

x holds the node voltages and, where the source has leakage inductance, the
current of each winding end. M gathers dq/dv of every capacitor and diode.
Every method takes a whole batch of states: t of shape (…), x of shape (…, n).
"""
import numpy as np

from parts import Capacitors, Diodes, Wave
from topologies import BUILDERS, GROUND


class Equations:
    """One case; size is the number of unknowns, names those that are nodes."""

    def __init__(self, case):
        self.case = case
        self.source = case["source"]
        self.period = 1 / self.source["frequency"]
        self.wave = Wave(self.source)
        self.net = BUILDERS[case["topology"]](case["stages"])
        assert len(self.net.capacitors) == len(case["capacitors"]), "wrong number of capacitors"
        self.names = self.net.nodes
        self.resistors = []
        self.add_stores()
        self.leakage = self.source.get("leakage", 0)
        self.size = len(self.names) + (len(self.net.ends) if self.leakage else 0)
        self.gather()

    def add_stores(self):
        """Capacitors, each behind its series resistance, and the strays to ground
        of every node but the winding ends.

        A winding end that meets only resistances has no charge of its own; a
        millionth of the smallest capacitor across it makes M regular."""
        parts, places = list(self.case["capacitors"]), []
        ladder = [n for n in self.names if n not in {end[0] for end in self.net.ends}]
        for k, (plus, minus) in enumerate(self.net.capacitors):
            if parts[k].get("esr", 0) > 0:
                inside = self.net.node(f"inside C{k + 1}")
                self.resistors.append((minus, inside, parts[k]["esr"]))
                minus = inside
            places.append((plus, minus))
        if self.case.get("stray", 0) > 0:
            places += [(name, GROUND) for name in ladder]
            parts += [{"c": self.case["stray"]}] * len(ladder)
        if self.resistors:
            places += [end[:2] for end in self.net.ends]
            parts += [{"c": 1e-6 * min(p["c"] for p in self.case["capacitors"])}] * len(self.net.ends)
        self.stores, self.store_at = Capacitors(parts), places

    def column(self, plus, minus):
        """The row that maps x to the voltage between two nodes."""
        row = np.zeros(self.size)
        for node, sign in ((plus, 1), (minus, -1)):
            if node != GROUND:
                row[self.names.index(node)] += sign
        return row

    def gather(self):
        """Incidence matrices, a column for each element, and what is constant."""
        columns = lambda pairs: np.array([self.column(*p[:2]) for p in pairs]).reshape(-1, self.size).T
        self.caps = columns(self.net.capacitors)
        self.store = columns(self.store_at)
        self.diode = columns(self.net.diodes)
        self.end = columns(self.net.ends)
        self.output = self.column(self.net.plus, self.net.minus)
        self.phase = np.array([e[2] for e in self.net.ends], float)
        self.diodes = Diodes(self.case["diode"])
        self.linear = np.zeros((self.size, self.size))  # −dr/dx of the linear parts
        self.esr = columns(self.resistors)
        self.linear += quadratic(self.esr, np.array([1 / r[2] for r in self.resistors]))
        load = self.case["load"]
        if load.get("resistance", 0) > 0:
            self.linear += np.outer(self.output, self.output) / load["resistance"]
        self.drain = self.output * load.get("current", 0)
        self.add_source()
        self.fixed = None
        if self.stores.constant and self.diodes.constant:
            zero = np.zeros(self.size)
            self.fixed = np.linalg.inv(self.mass(*self.capacitances(zero)[::2]))

    def add_source(self):
        """The winding ends, as currents flow·x + emf·wave into their nodes."""
        peak, r = self.source["peak"] * self.phase, self.source["resistance"]
        self.inductance = np.zeros((self.size, self.size))
        if not self.leakage:
            self.linear += self.end @ self.end.T / r
            self.drive = self.end @ (peak / r)
            self.flow = -self.end.T / r
            self.emf = peak / r
            return
        k = np.arange(len(self.names), self.size)
        self.flow = np.eye(self.size)[k]
        self.emf = 0 * peak
        self.linear -= self.end @ self.flow
        self.linear += self.flow.T @ (self.end.T + r * self.flow)
        self.drive = self.flow.T @ peak
        self.inductance[k, k] = self.leakage

    def capacitances(self, x):
        """dq/dv and its slope of the stores, then of the diodes."""
        c, c_slope = self.stores.capacitance(x @ self.store)
        v = x @ self.diode
        if self.diodes.constant:
            return c, c_slope, *self.diodes.depletion(v)
        _, g, g_slope = self.diodes.current(v)
        return c, c_slope, *self.diodes.capacitance(v, g, g_slope)

    def mass(self, c, cd):
        """M from the capacitances of the stores and of the diodes."""
        return quadratic(self.store, c) + quadratic(self.diode, cd) + self.inductance

    def right(self, t, x):
        """r(x, t): what flows into each node, and the voltage on each inductance."""
        i, _, _ = self.diodes.current(x @ self.diode)
        return self.wave.at(t)[..., None] * self.drive - x @ self.linear.T - i @ self.diode.T - self.drain

    def slope(self, t, x):
        """dx/dt."""
        r = self.right(t, x)
        if self.fixed is not None:
            return r @ self.fixed.T
        c, _, cd, _ = self.capacitances(x)
        return np.linalg.solve(self.mass(c, cd), r[..., None])[..., 0]

    def jacobian(self, t, x):
        """d(dx/dt)/dx = M⁻¹(dr/dx − dM/dx · dx/dt)."""
        _, g, _ = self.diodes.current(x @ self.diode)
        right = -self.linear - quadratic(self.diode, g)
        if self.fixed is not None:
            return self.fixed @ right
        c, c_slope, cd, cd_slope = self.capacitances(x)
        dx = self.slope(t, x)
        right -= quadratic(self.store, c_slope * (dx @ self.store)) + quadratic(self.diode, cd_slope * (dx @ self.diode))
        return np.linalg.solve(self.mass(c, cd), right)

    def start(self, share):
        """A first guess: a share of the unloaded direct voltages. While no diode
        conducts, the source swings every node in its phasor; every diode holds
        the swing across it as direct voltage."""
        peak, omega = self.source["peak"], 2 * np.pi / self.period
        c, _ = self.stores.capacitance(np.full(self.store.shape[1], 1.5 * peak))
        cd, _ = self.diodes.depletion(np.full(self.diode.shape[1], -peak))
        swing = np.abs(np.linalg.solve(1j * omega * self.mass(c, cd) + self.linear, self.drive) @ self.diode)
        still = np.concatenate((self.end, self.esr), axis=1)
        rows = np.concatenate((self.diode, still), axis=1).T
        return share * np.linalg.lstsq(rows, np.concatenate((-swing, np.zeros(still.shape[1]))), rcond=None)[0]


def quadratic(columns, weights):
    """Σ weight·column·columnᵀ over the last axis of the weights."""
    return (columns * weights[..., None, :]) @ columns.T
