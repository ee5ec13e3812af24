"""A random linear stick run by the program, against SciPy.

Reference: scipy.signal.lsim with first-order hold (exact for loads linear between samples), on matrices built here from
the study's numbers alone. Agreement asked: 1e-8 of the largest value of each quantity.
Usage: scipy_linear.py PILOTIS SCHEME SEED
"""

import pathlib
import subprocess
import sys
import tempfile

import h5py
import numpy as np
from scipy.signal import lsim

GRAVITY = 9.80665
STEP, SAMPLES, TAIL = 0.01, 1200, 3.0


def random_stick(rng, dashpots):
    n = int(rng.integers(2, 9))
    return {
        "h": rng.uniform(3.0, 5.0, n).round(3),
        "m": rng.uniform(100, 600, n).round(3),  # t
        "k": rng.uniform(5e4, 5e5, n).round(1),  # kN/m
        "c": rng.uniform(10, 800, n).round(2) if dashpots else np.zeros(n),  # kN s/m
        "p_delta": dashpots,
        "alpha": 0.2,
        "beta": 0.002,
    }


def study_text(stick, scheme):
    lines = [
        'title = "random stick"', "[units]", 'force = "kN"', 'length = "m"', 'mass = "t"',
        "[building]", 'kind = "stick"', f'p_delta = {str(stick["p_delta"]).lower()}',
        f'damping = {{ kind = "rayleigh", mass_factor = {stick["alpha"]}, stiffness_factor = {stick["beta"]} }}',
    ]
    for h, m, k, c in zip(stick["h"], stick["m"], stick["k"], stick["c"]):
        lines += ["[[story]]", f"height = {h}", f"mass = {m}", f"dashpot = {c}",
                  f'spring = {{ law = "linear", stiffness = {k} }}']
    lines += ["[suite]", 'motions = ["motion.csv"]', "[march]", f'scheme = {{ name = "{scheme}" }}', f"step = {STEP}",
              f"tail = {TAIL}", "collapse_drift_ratio = 10.0", "[keep]", 'histories = "all"']
    return "\n".join(lines) + "\n"


def chain(values):
    matrix = np.diag(values + np.append(values[1:], 0))
    return matrix - np.diag(values[1:], 1) - np.diag(values[1:], -1)


def reference(stick, ground):
    """Histories by SciPy, SI."""
    m, k, c, h = stick["m"] * 1e3, stick["k"] * 1e3, stick["c"] * 1e3, stick["h"]
    n = len(m)
    elastic = chain(k)
    weight_above = np.cumsum((m * GRAVITY)[::-1])[::-1]
    stiffness = elastic - (chain(weight_above / h) if stick["p_delta"] else 0)
    damping = stick["alpha"] * np.diag(m) + stick["beta"] * elastic + chain(c)
    inverse = np.diag(1 / m)
    a = np.block([[np.zeros((n, n)), np.eye(n)], [-inverse @ stiffness, -inverse @ damping]])
    b = np.concatenate([np.zeros(n), -np.ones(n)])[:, None]
    times = np.arange(len(ground)) * STEP
    _, _, x = lsim((a, b, np.eye(2 * n), np.zeros((2 * n, 1))), ground, times)
    u, v = x[:, :n], x[:, n:]
    drift = np.diff(u, axis=1, prepend=0)
    spring = drift * k
    damping_part = np.cumsum((v @ damping)[:, ::-1], axis=1)[:, ::-1]
    shear = spring + damping_part
    moment = np.cumsum((shear * h)[:, ::-1], axis=1)[:, ::-1]
    absolute = -(u @ stiffness + v @ damping) / m
    return {"floor_displacement": u, "floor_velocity": v, "floor_acceleration": absolute, "drift": drift,
            "drift_ratio": drift / h, "story_shear_spring": spring, "story_shear_damping": damping_part,
            "story_shear": shear, "base_shear": shear[:, 0], "overturning_moment": moment}


def compare(file, expected):
    worst = 0.0
    for name, values in expected.items():
        scale = np.abs(values).max()
        got = file["histories/0"][name][()].reshape(values.shape)
        worst = max(worst, np.abs(got - values).max() / scale)
        peak = file["peaks"][name][0]
        index = np.abs(values).argmax(axis=0)
        largest = np.take_along_axis(values.reshape(len(values), -1), index.reshape(1, -1), 0).ravel()
        worst = max(worst, np.abs(np.abs(np.ravel(peak)) - np.abs(largest)).max() / scale)
    return worst


def main(pilotis, scheme, seed):
    rng = np.random.default_rng(int(seed))
    # Modal superposition needs damping that does not couple modes: no dashpots, no P-Delta.
    stick = random_stick(rng, dashpots=scheme != "modal")
    samples = rng.normal(0, 1.5, SAMPLES).round(6)
    ground = np.concatenate([samples, np.zeros(1 + int(TAIL / STEP))])
    with tempfile.TemporaryDirectory() as folder:
        where = pathlib.Path(folder)
        (where / "study.toml").write_text(study_text(stick, scheme))
        (where / "motion.csv").write_text("time (s), acceleration (m/s^2)\n" +
                                          "".join(f"{i * STEP:.2f},{a:.6f}\n" for i, a in enumerate(samples)))
        subprocess.run([pilotis, "run", "study.toml", "-o", "out.h5"], cwd=where, check=True, stdout=subprocess.DEVNULL)
        with h5py.File(where / "out.h5") as file:
            worst = compare(file, reference(stick, ground))
    print(f"{scheme}, {len(stick['m'])} stories: largest difference {worst:.2e} of the largest value")
    return 0 if worst < 1e-8 else 1


if __name__ == "__main__":
    sys.exit(main(*sys.argv[1:]))
