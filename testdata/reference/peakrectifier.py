"""Doublers with ideal diodes, exactly: linear pieces joined where diodes switch.

Everything is in units of the source: peak 1, angular frequency 1, load 1. So
C stands for ωRC and r for R_s/R. The state is (first capacitor, second
capacitor, sin φ, cos φ, ∫ output dφ), whose rate is linear in it while the
same diodes conduct; each piece is a matrix exponential and each switching
angle a root found to rounding.
"""
import numpy as np
from scipy.linalg import expm
from scipy.optimize import brentq

OPEN, FIRST, SECOND = 0, 1, 2


class Doubler:
    """pieces are the rates while no diode, D1 or D2 conducts; guards are the rows
    whose product with the state is above zero where D1 or D2 is on; guess holds
    the capacitors' voltages to start from."""

    def __init__(self, pieces, guards, guess):
        self.pieces, self.guess = pieces, np.array(guess)
        self.guards = dict(zip((FIRST, SECOND), guards))

    def mode(self, x):
        return next((m for m, row in self.guards.items() if row @ x > 0), OPEN)

    def period(self, v, parts=720):
        """The state at the end of a period that starts with voltages v."""
        x, h = np.array([*v, 0, 1, 0]), 2 * np.pi / parts
        moves = [expm(h * a) for a in self.pieces]
        for k in range(parts):
            x[2], x[3] = np.sin(k * h), np.cos(k * h)
            x = self.part(x, h, moves)
        return x

    def part(self, x, h, moves):
        """One part of the period, short enough that at most one diode switches."""
        mode = self.mode(x)
        to = moves[mode] @ x
        after = self.mode(to)
        if after == mode:
            return to
        row, rate = self.guards[mode or after], self.pieces[mode]
        at = brentq(lambda d: row @ expm(d * rate) @ x, 0, h, xtol=1e-15)
        then = OPEN if mode else after
        return expm((h - at) * self.pieces[then]) @ expm(at * rate) @ x

    def mean(self):
        """The mean output of the closed period, by Newton's method."""
        v = self.guess
        for _ in range(40):
            end = self.period(v)
            slope = np.array([(self.period(v + d)[:2] - end[:2]) / 1e-6 for d in 1e-6 * np.eye(2)]).T
            step = np.linalg.solve(slope - np.eye(2), v - end[:2])
            v = v + step
            if np.abs(step).max() < 1e-10:
                return self.period(v)[4] / (2 * np.pi)
        raise ArithmeticError("the period does not close")


def rates(c, out, first, second):
    """A rate matrix from the currents, as rows over (a, b, sin, cos, ∫), that
    charge the two capacitors; out is the row of the output."""
    turn = [[0, 0, 0, 1, 0], [0, 0, -1, 0, 0]]
    return np.array([first / c, second / c, *turn, out])


def greinacher(c, r):
    """The half-wave doubler: a is the coupling capacitor, b the output."""
    a, b, sine, _, _ = np.eye(5)
    none, up = 0 * a, sine + a  # up: the voltage of the coupling node when nothing flows
    pieces = [rates(c, b, none, -b), rates(c, b, -up / r, -b), rates(c, b, -(up - b) / r, (up - b) / r - b)]
    return Doubler(pieces, (-up, up - b), (0.8, 1.6))


def bridge(c, r):
    """The bridge doubler: a is charged by the positive crest, b by the negative."""
    a, b, sine, _, _ = np.eye(5)
    out = a + b
    first, second = (sine - a) / r, (-sine - b) / r
    pieces = [rates(c, out, -out, -out), rates(c, out, first - out, -out), rates(c, out, -out, second - out)]
    return Doubler(pieces, (sine - a, -sine - b), (0.8, 0.8))
