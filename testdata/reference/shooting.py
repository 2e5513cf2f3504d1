"""The periodic steady state: Newton's method on the map x(0) → x(T).

The map is SciPy's implicit Radau IIA integrator of order five. Its derivative
follows the integrator's own steps: each is a collocation at three points, so
the sensitivity of its end to its start is a linear system in the Jacobians at
those points. (Shooting: T. J. Aprille, T. N. Trick, Proc. IEEE 60 (1972) 108,
from memory. Radau IIA: E. Hairer, G. Wanner, Solving Ordinary Differential
Equations II.)
"""
import numpy as np
from scipy.integrate import Radau

S6 = 6**0.5
NODES = np.array([(4 - S6) / 10, (4 + S6) / 10, 1])
WEIGHTS = np.array([(16 - S6) / 36, (16 + S6) / 36, 1 / 9])
MATRIX = np.array([
    [(88 - 7 * S6) / 360, (296 - 169 * S6) / 1800, (-2 + 3 * S6) / 225],
    [(296 + 169 * S6) / 1800, (88 + 7 * S6) / 360, (-2 - 3 * S6) / 225],
    WEIGHTS,
])


class Diverged(Exception):
    """The integrator or Newton's method gave up."""


class Trajectory:
    """One period: the step sizes, and times and states at the three nodes of
    every step, shapes (steps,), (steps, 3), (steps, 3, n)."""

    def __init__(self, eq, x, tolerance, parts):
        self.eq, self.first = eq, x
        steps, times, states = [], [], []
        begin = 0.0
        for phase in eq.wave.corners():
            end = phase * eq.period
            solver = Radau(eq.slope, begin, x, end, max_step=eq.period / parts, rtol=tolerance,
                           atol=tolerance * eq.source["peak"], jac=eq.jacobian)
            while solver.status == "running":
                message = solver.step()
                if solver.status == "failed":
                    raise Diverged(message)
                h = solver.t - solver.t_old
                t = solver.t_old + h * NODES
                steps.append(h)
                times.append(t)
                states.append(solver.dense_output()(t).T)
            begin, x = end, solver.y
        self.h, self.t, self.x = np.array(steps), np.array(times), np.array(states)
        self.last = x

    def gap(self):
        return self.last - self.first

    def integral(self, values):
        """∫ over the period of values given at the nodes, shape (steps, 3, …)."""
        return np.einsum("s,k,sk...->...", self.h, WEIGHTS, values)

    def sensitivity(self):
        """dx(T)/dx(0): the product of the steps' own sensitivities."""
        n = self.eq.size
        jac = self.eq.jacobian(self.t, self.x)
        big = np.einsum("s,ij,siab->siajb", self.h, MATRIX, jac).reshape(len(self.h), 3 * n, 3 * n)
        # Unknowns are the slopes K_i at the nodes: K_i = J_i(X + h Σ a_ij K_j).
        slopes = np.linalg.solve(np.eye(3 * n) - big, jac.reshape(len(self.h), 3 * n, n)).reshape(-1, 3, n, n)
        each = np.eye(n) + np.einsum("s,k,skab->sab", self.h, WEIGHTS, slopes)
        total = np.eye(n)
        for step in each:
            total = step @ total
        return total

    def passed(self):
        """The charge through each diode."""
        return self.integral(self.eq.diodes.current(self.x @ self.eq.diode)[0])

    def dead(self):
        """Whether a diode passes next to nothing, so that Newton's method cannot
        tell what the charge above it does."""
        passed = self.passed()
        return passed.min() < 0.05 * passed.max()


def steady(eq, tolerance, parts):
    """The closed period, the last Newton step [V] and how many periods were run.

    tolerance is the integrator's, relative and in units of the source peak; a
    step lasts at most one of so many parts of the period. The rule that ends it
    bounds the Newton step, not the gap: a long ladder's answer may be a thousand
    gaps away."""
    peak = eq.source["peak"]
    run, count = approach(eq)
    for tol, points, goal in ((1e-6, 60, 1e-4), (tolerance, parts, 3e-8)):
        run = Trajectory(eq, run.first, tol, points)
        count += 1
        for _ in range(60):
            run, step, tries = newton(eq, run, tol, points)
            count += tries
            if step <= goal * peak:
                break
        else:
            raise Diverged("the period map does not settle")
    return run, step, count


def approach(eq):
    """A first period in which every diode conducts: the further the guess lies
    below the answer, the harder the source charges the ladder."""
    count = 1
    for share in (0.93, 0.8, 0.65, 0.5, 0.35, 0.2):
        x = eq.start(share)
        for _ in range(4):
            run = Trajectory(eq, x, 1e-5, 60)
            x = run.last
            count += 1
            if not run.dead():
                return run, count
    return run, count


def newton(eq, run, tolerance, parts):
    """One damped step; where none pays, plain periods instead."""
    node = slice(len(eq.names))
    size = lambda x: np.abs(x[node]).max()
    step = np.linalg.solve(run.sensitivity() - np.eye(eq.size), -run.gap())
    share = min(1, 0.2 * abs(run.first @ eq.output) / size(step))
    for tries in range(1, 6):
        try:
            new = Trajectory(eq, run.first + share * step, tolerance, parts)
            close = size(step) <= 1e-6 * eq.source["peak"]
            if close or size(new.gap()) < size(run.gap()) and (run.dead() or not new.dead()):
                return new, share * size(step), tries
        except Diverged:
            pass
        share /= 3
    for _ in range(3):
        run = Trajectory(eq, run.last, tolerance, parts)
    return run, np.inf, tries + 3
