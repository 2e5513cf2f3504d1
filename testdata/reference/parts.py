"""Currents and capacitances of the parts, each an array over its last axis.

Everything is SI. A capacitance is dq/dv; its own slope dc/dv is given too,
for the Jacobian of the node equations.
"""
import numpy as np
from scipy.special import wrightomega


class Capacitors:
    """Capacitors whose share of C at a voltage is linear between the points of
    a table, flat outside, and even in the voltage."""

    def __init__(self, parts):
        self.c = np.array([p["c"] for p in parts], float)
        self.tables = [(k, np.array(p["bias"], float)) for k, p in enumerate(parts) if p.get("bias")]
        self.constant = not self.tables

    def capacitance(self, v):
        c = np.broadcast_to(self.c, v.shape).copy()
        slope = np.zeros(v.shape)
        for k, table in self.tables:
            volts, share = table[:, 0], table[:, 1]
            size = np.abs(v[..., k])
            c[..., k] *= np.interp(size, volts, share)
            steps = np.concatenate(([0], np.diff(share) / np.diff(volts), [0]))
            slope[..., k] = self.c[k] * steps[np.searchsorted(volts, size, side="right")] * np.sign(v[..., k])
        return c, slope


class Diodes:
    """i = IS(exp((v − i·RS)/(N·VT)) − 1), solved for i by the Wright omega
    function, with the depletion capacitance CJ0/(1 − v/VJ)^M, continued in a
    line above VJ/2, and a stored charge of transit·i."""

    def __init__(self, d):
        self.is_, self.rs, self.nvt = d["is"], d["rs"], d["n"] * d["vt"]
        self.cj0, self.vj, self.m = d["cj0"], d.get("vj", 0), d.get("m", 0)
        self.transit = d.get("transit", 0)
        self.constant = self.transit == 0 and self.vj == 0

    def current(self, v):
        """Current, conductance and the slope of the conductance."""
        drop = self.is_ * self.rs / self.nvt
        w = wrightomega(np.log(drop) + v / self.nvt + drop).real
        i = self.nvt / self.rs * w - self.is_
        return i, w / (self.rs * (1 + w)), w / (self.rs * self.nvt * (1 + w) ** 3)

    def capacitance(self, v, g, g_slope):
        c, slope = self.depletion(v)
        return c + self.transit * g, slope + self.transit * g_slope

    def depletion(self, v):
        if self.vj == 0:
            return np.full(v.shape, self.cj0), np.zeros(v.shape)
        below = 1 - np.minimum(v, self.vj / 2) / self.vj
        c = self.cj0 * below ** -self.m
        slope = c * self.m / (self.vj * below)
        return c + slope * np.maximum(v - self.vj / 2, 0), slope


class Wave:
    """The source in units of its peak; every shape starts at zero, rising."""

    def __init__(self, source):
        self.shape, self.f = source["waveform"], source["frequency"]
        self.edge = {"square": source.get("edge", 0), "triangle": 0.5}.get(self.shape)

    def at(self, t):
        phase = np.mod(np.asarray(t) * self.f, 1)
        if self.shape == "sine":
            return np.sin(2 * np.pi * phase)
        half = np.where(phase > 0.5, phase - 0.5, phase)
        sign = np.where(phase > 0.5, -1, 1)
        return sign * np.minimum(1, 2 * np.minimum(half, 0.5 - half) / self.edge)

    def corners(self):
        """Phases where the slope jumps, and the end of the period."""
        if self.shape == "sine":
            return [1.0]
        e = self.edge / 2
        return sorted({e, 0.5 - e, 0.5 + e, 1 - e}) + [1.0]
