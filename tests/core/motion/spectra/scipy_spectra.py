"""Random oscillators under a random motion against SciPy.

    scipy_spectra.py PROGRAM SEED

Elastic ones against scipy.signal.lsim, which is exact for loads linear between its times; yielding ones against
scipy.integrate.solve_ivp (DOP853 at 1e-9) with the spring written anew and every yield and reversal found as an event.
"""
import subprocess
import sys

import numpy as np
from scipy.integrate import solve_ivp
from scipy.signal import StateSpace, lsim

STEP, SAMPLES = 0.02, 400
PER_PERIOD = 1000
YIELDING_STEPS = 400
YIELDING = (2 * np.pi / YIELDING_STEPS) ** 2  # the stated error of the march, of the ductility


def program_says(program, motion, oscillators, per_period, ratio=0.0):
    head = f"{STEP} {per_period} {ratio} {len(motion)} {len(oscillators)}\n"
    body = " ".join(f"{a:.17g}" for a in motion) + "\n"
    rows = "\n".join(" ".join(f"{x:.17g}" for x in row) for row in oscillators) + "\n"
    out = subprocess.run([program], input=head + body + rows, capture_output=True, text=True, check=True).stdout
    return np.array([[float(x) for x in line.split()] for line in out.splitlines()])


def ground_until(motion, end):
    """Times and accelerations of the polygon: down to zero within a step after the last sample, then at rest."""
    times = np.append(STEP * np.arange(len(motion) + 1), end)
    return times, np.append(motion, [0.0, 0.0])


def elastic_peaks(motion, period, damping):
    w = 2 * np.pi / period
    end = STEP * len(motion) + 1.5 * period
    pieces = int(np.ceil(PER_PERIOD * STEP / period))
    times = np.arange(int(np.ceil(end / STEP)) * pieces + 1) * (STEP / pieces)
    ground = np.interp(times, *ground_until(motion, times[-1] + STEP))
    system = StateSpace([[0, 1], [-w * w, -2 * damping * w]], [[0], [-1]], np.eye(2), [[0], [0]])
    _, _, state = lsim(system, ground, times)
    u, v = state.T
    absolute = -(w * w * u + 2 * damping * w * v)
    return [np.abs(q).max() for q in (u, v, absolute)]


def missed_between_instants(motion, oscillator, peaks, per_period):
    """A peak between two instants h apart is missed by h^2 / 8 times the largest second derivative at most."""
    period, damping, _ = oscillator
    w, h = 2 * np.pi / period, STEP / np.ceil(per_period * STEP / period)
    slope = np.abs(np.diff(np.append(motion, 0.0))).max() / STEP
    of_u = np.abs(motion).max() + peaks[2]
    of_v = slope + 2 * damping * w * of_u + w * w * peaks[1]
    of_a = 2 * damping * w * of_v + w * w * of_u
    return h * h / 8 * np.array([of_u, of_v, of_a])


def yielding_peak(motion, period, damping, a_y, ratio):
    """Ductility and residual, in three states: elastic, sliding forward, sliding backward."""
    w = 2 * np.pi / period
    u_y = a_y / w**2
    times, ground = ground_until(motion, STEP * len(motion) + 6 * period)
    state, slip, sliding, largest = np.zeros(2), 0.0, 0, 0.0

    def force(u):
        spring = sliding * u_y if sliding else u - slip
        return w * w * (ratio * u + (1 - ratio) * spring)

    for start, end, first, last in zip(times[:-1], times[1:], ground[:-1], ground[1:]):
        slope = (last - first) / (end - start)

        def rate(t, y):
            return [y[1], -(first + slope * (t - start)) - 2 * damping * w * y[1] - force(y[0])]

        def reversal(_, y):
            return y[1]

        def yields(_, y):
            return abs(y[0] - slip) - u_y

        reversal.terminal = yields.terminal = True
        yields.direction = 1
        now = start
        while now < end - 1e-13:
            event = reversal if sliding else yields
            reversal.direction = -sliding
            run = solve_ivp(rate, (now, end), state, "DOP853", rtol=1e-9, atol=1e-12, events=[event], max_step=period / 40,
                            dense_output=True)
            # The stretch within the step may hold a turning point: looked for between the solver's own times.
            fine = run.sol(np.linspace(now, run.t[-1], 9))[0]
            largest = max(largest, np.abs(fine).max())
            now, state = run.t[-1], run.y[:, -1]
            if run.status == 1:
                if sliding:
                    slip, sliding = state[0] - sliding * u_y, 0
                else:
                    sliding = 1 if state[0] > slip else -1
    if sliding:
        slip = state[0] - sliding * u_y
    return largest / u_y, (1 - ratio) * slip


def check(what, found, wanted, allowed):
    if not abs(found - wanted) <= allowed:
        sys.exit(f"{what}: found {found:.8g}, SciPy has {wanted:.8g}, allowed {allowed:.2g}")


def main(program, seed):
    random = np.random.default_rng(seed)
    envelope = np.sin(np.pi * np.arange(SAMPLES) / SAMPLES)
    motion = 3 * envelope * np.convolve(random.standard_normal(SAMPLES + 4), np.ones(5) / 2, "valid")

    elastic = [(np.exp(random.uniform(np.log(0.05), np.log(8))), random.uniform(0, 0.5), 0.0) for _ in range(12)]
    exact = [elastic_peaks(motion, period, damping) for period, damping, _ in elastic]
    for per_period in (PER_PERIOD, 40):
        for row, wanted, ours in zip(elastic, exact, program_says(program, motion, elastic, per_period)):
            missed = missed_between_instants(motion, row, wanted, per_period)
            for name, a, b, m in zip(("displacement", "velocity", "acceleration"), ours, wanted, missed):
                check(f"T {row[0]:.4f} s, zeta {row[1]:.3f}: {name}", a, b, m + 1e-9 * b)

    ratio = random.uniform(0, 0.2)
    yielding = [(np.exp(random.uniform(np.log(0.2), np.log(2))), random.uniform(0, 0.1),
                 random.uniform(0.1, 0.6) * np.abs(motion).max()) for _ in range(3)]
    for row, ours in zip(yielding, program_says(program, motion, yielding, YIELDING_STEPS, ratio)):
        ductility, residual = yielding_peak(motion, *row, ratio)
        u_y = row[2] * (row[0] / (2 * np.pi)) ** 2
        check(f"T {row[0]:.4f} s, r {ratio:.3f}: ductility", ours[1], ductility, YIELDING * ductility)
        check(f"T {row[0]:.4f} s, r {ratio:.3f}: residual", ours[2], residual, 2 * YIELDING * ductility * u_y)
        check(f"T {row[0]:.4f} s: displacement", ours[0], ours[1] * u_y, 1e-12 * ours[0])


if __name__ == "__main__":
    main(sys.argv[1], int(sys.argv[2]))
