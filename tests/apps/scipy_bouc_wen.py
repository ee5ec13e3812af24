"""A Bouc-Wen stick with Rayleigh damping in two modes and P-Delta run by the program, against SciPy's DOP853.

The reference writes the equations of motion and u_y z' = A d' - beta |d'| |z|^(n-1) z - gamma d' |z|^n (Wen 1976) anew,
as one system of ordinary differential equations, and integrates it from sample to sample at rtol 1e-9, atol 1e-12.
Asked: at a fine step every peak within 1e-4 of the largest of its kind; at the automatic step every peak within its own
step error and what the reference's output times (a fifth of a sample) may miss, plus 1e-6 of the largest.
Usage: scipy_bouc_wen.py PILOTIS SEED
"""

import pathlib
import subprocess
import sys
import tempfile

import h5py
import numpy as np
from scipy.integrate import solve_ivp
from scipy.linalg import eigh

GRAVITY = 9.80665
STEP, SAMPLES, TAIL, INSIDE = 0.02, 500, 2.0, 5


def stick(rng):
    n = 4
    return {"h": rng.uniform(3.0, 4.5, n).round(2), "m": rng.uniform(150, 300, n).round(1),  # t
            "k": np.sort(rng.uniform(6e4, 1.6e5, n).round(0))[::-1],  # kN/m
            "v": np.sort(rng.uniform(500, 1200, n).round(0))[::-1],  # kN
            "r": 0.05, "n": 1.5, "beta": 0.6, "gamma": 0.4, "A": 1.0, "ratio": 0.04}


def study(s, step):
    lines = ['title = "Bouc-Wen stick"', "[units]", 'force = "kN"', 'length = "m"', 'mass = "t"', "[building]", 'kind = "stick"',
             "p_delta = true", f'damping = {{ kind = "rayleigh", ratio = {s["ratio"]}, modes = [1, 3] }}']
    for h, m, k, v in zip(s["h"], s["m"], s["k"], s["v"]):
        lines += ["[[story]]", f"height = {h}", f"mass = {m}",
                  f'spring = {{ law = "bouc_wen", stiffness = {k}, yield_shear = {v}, post_yield_ratio = {s["r"]}, '
                  f'exponent = {s["n"]}, beta = {s["beta"]}, gamma = {s["gamma"]}, A = {s["A"]} }}']
    lines += ["[suite]", 'motions = ["motion.csv"]', "[march]", f"step = {step}", f"tail = {TAIL}"]
    return "\n".join(lines) + "\n"


def chain(values):
    return np.diag(values + np.append(values[1:], 0)) - np.diag(values[1:], 1) - np.diag(values[1:], -1)


def reference(s, ground):
    """Largest magnitudes by SciPy, SI."""
    m, k, v, h = s["m"] * 1e3, s["k"] * 1e3, s["v"] * 1e3, s["h"]
    n, uy, r = len(m), v / k, s["r"]
    elastic, mass = chain(k), np.diag(m)
    w = np.sqrt(eigh(elastic, mass, eigvals_only=True))
    a0, a1 = np.linalg.solve([[1 / (2 * w[0]), w[0] / 2], [1 / (2 * w[2]), w[2] / 2]], [s["ratio"]] * 2)
    damping = a0 * mass + a1 * elastic
    geometric = chain(np.cumsum((m * GRAVITY)[::-1])[::-1] / h)

    def parts(y):
        u, rate, z = y[:n], y[n:2 * n], y[2 * n:]
        drift, drift_rate = np.diff(u, prepend=0), np.diff(rate, prepend=0)
        spring = r * k * drift + (1 - r) * v * z
        on_floors = spring - np.append(spring[1:], 0)
        total = -(damping @ rate + on_floors - geometric @ u) / m  # absolute acceleration
        return rate, drift, drift_rate, z, spring, total

    def slope(t, y, t0, g0, g1):
        rate, _, drift_rate, z, _, total = parts(y)
        power = np.abs(z) ** s["n"]
        zdot = (s["A"] * drift_rate - s["beta"] * np.abs(drift_rate) * power * np.sign(z) - s["gamma"] * drift_rate * power) / uy
        return np.concatenate([rate, total - (g0 + (g1 - g0) * (t - t0) / STEP), zdot])

    y, peaks = np.zeros(3 * n), {}
    for i in range(len(ground) - 1):
        t0 = i * STEP
        done = solve_ivp(slope, (t0, t0 + STEP), y, "DOP853", np.linspace(t0, t0 + STEP, INSIDE + 1), rtol=1e-9, atol=1e-12,
                         args=(t0, ground[i], ground[i + 1]))
        y = done.y[:, -1]
        for column in done.y.T:
            _, drift, _, _, spring, total = parts(column)
            for name, values in (("drift", drift), ("story_shear_spring", spring), ("floor_acceleration", total)):
                peaks[name] = np.maximum(peaks.get(name, 0), np.abs(values))
    return peaks


def compare(file, peaks, fine):
    good = True
    for name, values in peaks.items():
        got, error = np.abs(file["peaks"][name][0]), file["peaks"][name + "_step_error"][0]
        # A cosine seen every STEP / INSIDE misses at most (omega dt)^2 / 8 of its peak; the shortest period here is above
        # 0.1 s, and only accelerations have much of it.
        missed = (2 * np.pi / 0.1 * STEP / INSIDE) ** 2 / 8 * values if name == "floor_acceleration" else 1e-4 * values
        allowed = 1e-4 * values.max() if fine else error + 1e-6 * values.max()
        worst = np.max(np.abs(got - values) / (allowed + missed))
        print(f"{'fine' if fine else 'auto'} step, {name}: off by {np.max(np.abs(got - values) / values.max()):.1e} of the largest, "
              f"{worst:.2f} of what is allowed")
        good &= bool(worst <= 1)
    return good


def main(pilotis, seed):
    rng = np.random.default_rng(int(seed))
    s = stick(rng)
    shape = np.sin(np.pi * np.arange(SAMPLES) / SAMPLES)
    samples = (np.convolve(rng.normal(0, 4.0, SAMPLES), np.ones(6) / 6, "same") * 0.9 * shape).round(6)
    peaks = reference(s, np.concatenate([samples, np.zeros(1 + int(TAIL / STEP))]))
    good = True
    with tempfile.TemporaryDirectory() as folder:
        where = pathlib.Path(folder)
        (where / "motion.csv").write_text("time (s), acceleration (m/s^2)\n" +
                                          "".join(f"{i * STEP:.2f},{a:.6f}\n" for i, a in enumerate(samples)))
        for step in ('"auto"', 0.0005):
            (where / "study.toml").write_text(study(s, step))
            subprocess.run([pilotis, "run", "study.toml", "-q", "-o", "out.h5"], cwd=where, check=True, stdout=subprocess.DEVNULL)
            with h5py.File(where / "out.h5") as file:
                print("ductility", np.abs(file["peaks/ductility"][0]).round(2))
                good &= compare(file, peaks, step == 0.0005)
    return 0 if good else 1


if __name__ == "__main__":
    sys.exit(main(*sys.argv[1:]))
