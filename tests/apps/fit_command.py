"""`pilotis fit` as a user types it, on invented records, against NumPy and SciPy.

Spectra are computed here by scipy.signal (lsim's first-order hold through an exact matrix exponential), on steps of at
most a hundredth of the period. The program looks at forty steps a period, so it may miss 1 - cos(pi/40) = 0.31 % of a
peak, this script 0.05 %: agreement is asked to 0.4 %.
Usage: fit_command.py PILOTIS CHECK
"""

import json
import pathlib
import subprocess
import sys
import tempfile

import numpy as np
from scipy.linalg import expm
from scipy.signal import lfilter

GRAVITY = 9.80665
MISSED = 0.004
STEP = 0.01
TARGET = ["--target", "en_1998", "--ag", "0.3 g", "--type", "1", "--ground", "B"]
RANGE = ["--from", "0.2", "--to", "2"]


def check(told, holds):
    print(("ok    " if holds else "WRONG ") + told)
    return bool(holds)


def close(told, found, expected, relative):
    worst = np.max(np.abs(np.asarray(found) / np.asarray(expected) - 1))
    return check(f"{told}: off by {worst:.2e}, {relative:.0e} asked", worst <= relative)


def fit(pilotis, folder, *arguments):
    return subprocess.run([pilotis, "fit", *map(str, arguments)], cwd=folder, capture_output=True, text=True)


def told(run):
    if run.returncode not in (0, 1):
        raise SystemExit(f"exit status {run.returncode}: {run.stderr}")
    return json.loads(run.stdout)


def en_1998(period, ag=0.3 * GRAVITY, S=1.2, T_B=0.15, T_C=0.5, T_D=2.0):
    """EN 1998-1:2004, 3.2.2.2, type 1, ground B, 5 % (table 3.2; from memory)."""
    T = np.asarray(period, float)
    rise = 1 + T / T_B * 1.5
    return ag * S * np.select([T < T_B, T <= T_C, T <= T_D], [rise, 2.5, 2.5 * T_C / T], 2.5 * T_C * T_D / T**2)


def write_record(path, samples):
    np.savetxt(path, samples, fmt="%.12f", header="units: m/s^2\nstep: 0.01 s\nfirst sample at: 0 s")


def read_record(path):
    lines = [line for line in pathlib.Path(path).read_text().splitlines() if line and not line.startswith("#")]
    return np.array([float(line.split(",")[1]) for line in lines[1:]])


def noise(seed, level=1.0, color=1.0):
    """Invented: noise under a bump, through a low-pass of one pole."""
    rng = np.random.default_rng(seed)
    t = STEP * np.arange(2501)
    return level * lfilter([color], [1, color - 1], rng.standard_normal(t.size)) * np.sin(np.pi * t / t[-1]) ** 2


def displacement(samples, period, damping):
    """Of an oscillator, at fine steps, and five periods longer than the record; acceleration linear between samples."""
    parts = max(1, int(np.ceil(100 * STEP / period)))
    ground = np.concatenate([samples, np.zeros(int(5 * period / STEP) + 2)])
    at = np.arange((ground.size - 1) * parts + 1) / parts
    fine = np.interp(at, np.arange(ground.size), ground)
    omega = 2 * np.pi / period
    march = expm(np.array([[0, 1, 0, 0], [-omega**2, -2 * damping * omega, -1, 0], [0, 0, 0, 1], [0, 0, 0, 0]])
                 * (STEP / parts))
    a = march[:2, :2]
    # The input over a step, (p0, slope): two columns; slope from differences.
    slope = np.diff(fine) / (STEP / parts)
    force = np.outer(fine[:-1], march[:2, 2]) + np.outer(slope, march[:2, 3])
    # u_(n+1) = trace u_n - det u_(n-1) + b: the second-order recurrence of u alone.
    trace, det = np.trace(a), np.linalg.det(a)
    b = force[:, 0].copy()
    b[1:] += a[0, 1] * force[:-1, 1] - a[1, 1] * force[:-1, 0]
    return np.concatenate([[0], lfilter([1], [1, -trace, det], b)])


def spectrum(samples, periods, damping=0.05):
    return np.array([(2 * np.pi / T) ** 2 * np.max(np.abs(displacement(samples, T, damping))) for T in periods])


def rotd100(first, second, periods):
    angles = np.radians(np.arange(180))
    values = []
    for T in periods:
        u, v = displacement(first, T, 0.05), displacement(second, T, 0.05)
        values.append((2 * np.pi / T) ** 2 * max(np.max(np.abs(u * np.cos(x) + v * np.sin(x))) for x in angles))
    return np.array(values)


def multiples(pilotis, folder):
    """Records that are multiples of one: the factors are its factor over theirs, in closed form."""
    base, times = noise(1), [1, 2, 0.25, 3]
    for i, factor in enumerate(times):
        write_record(folder / f"m{i}.txt", factor * base)
    files = [f"m{i}.txt" for i in range(4)]
    each = told(fit(pilotis, folder, "scale", *files, *TARGET, *RANGE, "--json"))
    periods, target = np.array(each["spectra"]["period_s"]), np.array(each["spectra"]["target_m_per_s2"])
    own = spectrum(base, periods)
    expected = np.exp(np.mean(np.log(en_1998(periods) / own)))
    factors = [m["factor"] for m in each["motions"]]
    single = told(fit(pilotis, folder, "scale", *files, *TARGET, *RANGE, "--single", "--json"))
    lifted = told(fit(pilotis, folder, "scale", *files, *TARGET, *RANGE, "--at-least", "0.9", "--json"))
    mean = np.array(lifted["spectra"]["after_m_per_s2"])
    unlifted = np.array(each["spectra"]["after_m_per_s2"])
    return [
        close("target ordinates of EN 1998-1", target, en_1998(periods), 1e-12),
        close("factor of each, closed form", factors, expected / np.array(times), MISSED),
        close("they differ by the multiples alone", np.array(factors) * times, factors[0], 1e-9),
        close("one factor for all, of the mean 6.25/4", [m["factor"] for m in single["motions"]], expected / 1.5625, MISSED),
        close("the lifted mean touches 0.9 of the target", np.min(mean / en_1998(periods)), 0.9, 1e-9),
        close("the lift is the least that does it", lifted["lift"], 0.9 / np.min(unlifted / en_1998(periods)), 1e-9),
        close("the scaled mean is SciPy's", unlifted, expected * own, MISSED),
    ]


def fitting_suite(pilotis, folder):
    """The target is the suite's own mean: factor 1; and the [suite] section runs as it is printed."""
    for i in range(3):
        write_record(folder / f"r{i}.txt", noise(10 + i))
    periods = np.geomspace(0.2, 2, 200)
    rows = [spectrum(noise(10 + i), periods) for i in range(3)]
    np.savetxt(folder / "mean.csv", np.column_stack([periods, np.mean(rows, axis=0) / GRAVITY]), delimiter=", ",
               header="period (s), acceleration (g)", comments="", fmt="%.12g")
    files = ["r0.txt", "r1.txt", "r2.txt"]
    wanted = ["--target-file", "mean.csv", "--from", repr(periods[0]), "--to", repr(periods[-1])]
    single = told(fit(pilotis, folder, "scale", *files, *wanted, "--single", "--json", "-o", "factors.csv"))
    section = fit(pilotis, folder, "scale", *files, *wanted, "--single", "--study").stdout
    building = ('[building]\nkind = "stick"\ndamping = { kind = "none" }\n[[story]]\nheight = 3\nmass = 1e5\n'
                'spring = { law = "linear", stiffness = 1e7 }\n[march]\nscheme = { name = "newmark" }\n')
    (folder / "s.toml").write_text('title = "t"\n[units]\nforce = "N"\nlength = "m"\n' + building + section)
    checked = subprocess.run([pilotis, "check", "s.toml", "--json"], cwd=folder, capture_output=True, text=True)
    rows = [line for line in (folder / "factors.csv").read_text().splitlines() if not line.startswith("#")]
    return [
        close("factor 1 of a suite that fits", [m["factor"] for m in single["motions"]], 1.0, MISSED),
        check("no lift is needed", single["lift"] == 1),
        check("the [suite] section is a study's", checked.returncode == 0 and '"factor"' in checked.stdout),
        check("table of factors", rows[0] == "file, factor (1)" and rows[1] == f"r0.txt, {single['motions'][0]['factor']}"),
    ]


def planted(pilotis, folder):
    """Three records matched to the target among thirty that are not: they are found, with factor 1."""
    (folder / "many").mkdir()
    for i in range(30):
        write_record(folder / "many" / f"x{i:02}.txt", noise(40 + i, color=0.02 + 0.03 * (i % 5)))
    hidden = ["x04.txt", "x11.txt", "x23.txt"]
    for name in hidden:
        run = fit(pilotis, folder, "match", f"many/{name}", *TARGET, *RANGE, "-o", "out.csv", "--tolerance", "0.1")
        if run.returncode:
            return [check(f"matching {name}: {run.stdout}{run.stderr}", False)]
        (folder / "out.csv").rename(folder / "many" / name)
    chosen = told(fit(pilotis, folder, "select", "many", "-n", 3, *TARGET, *RANGE, "--json"))
    names = [pathlib.Path(m["files"][0]).name for m in chosen["motions"]]
    return [
        check(f"the planted three are found: {names}", names == hidden),
        check("of thirty offered", chosen["offered"] == 30),
        close("their factors are 1 within the tolerance", [m["factor"] for m in chosen["motions"]], 1.0, 0.1),
    ]


def matching(pilotis, folder):
    """A matched record's spectra by SciPy, and its ground's displacement by a plain sum."""
    samples = noise(3)
    # The ground at rest at the end: taken out by a parabola's two terms under the same bump.
    t = STEP * np.arange(samples.size)
    ramp = np.column_stack([np.sin(np.pi * t / t[-1]) ** 2, np.sin(np.pi * t / t[-1]) ** 2 * (t / t[-1])])
    ends = lambda a: np.array([np.sum(a) * STEP, np.sum(np.cumsum(a)) * STEP**2])
    samples = samples - ramp @ np.linalg.solve(np.column_stack([ends(ramp[:, 0]), ends(ramp[:, 1])]), ends(samples))
    write_record(folder / "given.txt", samples)
    run = fit(pilotis, folder, "match", "given.txt", *TARGET, *RANGE, "-o", "out.csv", "--json", "--svg", "p.svg", "--csv", "p.csv")
    result = told(run)
    periods = np.array(result["spectra"]["period_s"])
    after, record = read_record(folder / "out.csv"), result["records"][0]
    own = spectrum(after, periods)
    velocity, ground = np.cumsum(after) * STEP, np.cumsum(np.cumsum(after)) * STEP**2
    header = (folder / "out.csv").read_text().split("\ntime")[0]
    again = [line for line in header.splitlines() if line.startswith("# pilotis fit match")][0]
    subprocess.run(f"'{pilotis}' {again[10:]} -o again.csv", shell=True, cwd=folder, check=True, capture_output=True)
    return [
        check("exit status 0: within the tolerance", run.returncode == 0 and record["within_tolerance"]),
        close("SciPy's spectrum is within 5 % of the target", own, en_1998(periods), 0.05 + 1.05 * MISSED),
        close("and is what the program says", own, result["spectra"]["after_m_per_s2"], MISSED),
        check(f"velocity returns: {velocity[-1]:.1e} m/s", abs(velocity[-1]) < 1e-6),
        check(f"displacement returns: {ground[-1]:.1e} of {np.max(np.abs(ground)):.2g} m", abs(ground[-1]) < 1e-5),
        check("the header says how", all(part in header for part in ("EN 1998-1:2004", "SHA-256", "factor before", "iterations"))),
        check("its command makes the same file", (folder / "again.csv").read_text() == (folder / "out.csv").read_text()),
        check("a picture and a table are there", (folder / "p.svg").read_text().count("<path") > 10
              and (folder / "p.csv").read_text().count("\n") == periods.size + 3),
    ]


def clauses(pilotis, folder):
    """Suites built to meet or fail one clause."""
    for i in range(3):
        write_record(folder / f"r{i}.txt", noise(20 + i))
    code = [*TARGET, "--code", "en_1998", "--period", "0.8"]
    files = ["r0.txt", "r1.txt", "r2.txt"]

    def results(run):
        return {c["clause"].split(", ")[1]: c["result"] for c in told(run)["clauses"]}

    high = fit(pilotis, folder, "scale", *files, *code, "--at-least", "3", "--json")
    two = fit(pilotis, folder, "scale", *files[:2], *code, "--at-least", "3", "--json")
    low = fit(pilotis, folder, "scale", *files, *code, "--at-least", "0.85", "--single", "--json")
    text = fit(pilotis, folder, "scale", *files, *code).stdout
    touching = fit(pilotis, folder, "scale", *files, *code, "--at-least", "0.9", "--json")
    return [
        check("a mean lifted to 90 % holds 3.2.3.1.2(4)c", results(touching)["3.2.3.1.2(4)c"] == "holds"
              and abs(told(touching)["least_mean_over_target"] - 0.9) < 1e-9),
        check("three motions high enough: every clause holds, exit status 0",
              high.returncode == 0 and "does not hold" not in results(high).values()),
        check("two motions fail the number alone, exit status 1", two.returncode == 1
              and [c for c, r in results(two).items() if r == "does not hold"] == ["3.2.3.1.2(4)a"]),
        check("a mean that touches 85 % fails 3.2.3.1.2(4)c", low.returncode == 1
              and told(low)["least_mean_over_target"] < 0.9
              and results(low)["3.2.3.1.2(4)c"] == "does not hold"),
        check("the edition and the caution are on the screen", "EN 1998-1:2004" in text and "licensed engineer" in text),
    ]


def pairs(pilotis, folder):
    """Pairs A+B: RotD100 by rotation here, and ASCE/SEI 7-16, 16.2 on eleven and ten of them."""
    for i in range(11):
        write_record(folder / f"e{i}.txt", noise(100 + i))
        write_record(folder / f"n{i}.txt", noise(200 + i)[:-7])  # a few samples short
    names = [f"e{i}.txt+n{i}.txt" for i in range(11)]
    code = ["--target", "asce_7_16_mcer", "--s-ds", "1 g", "--s-d1", "0.6 g", "--t-l", "8", "--code", "asce_7_16", "--period", "0.9",
            "--json"]
    good = told(fit(pilotis, folder, "scale", *names, *code, "--at-least", "0.95"))
    ten = told(fit(pilotis, folder, "scale", *names[:10], *code, "--at-least", "0.95"))
    alone = fit(pilotis, folder, "scale", "e0.txt", *code)
    one = told(fit(pilotis, folder, "scale", names[0], *code, "--periods", "12"))
    periods = np.array(one["spectra"]["period_s"])
    short = np.concatenate([noise(200)[:-7], np.zeros(7)])
    fails = lambda r: [c["clause"] for c in r["clauses"] if c["result"] == "does not hold"]
    return [
        close("RotD100", one["spectra"]["before_m_per_s2"], rotd100(noise(100), short, periods), MISSED),
        close("the range is 0.2 to 2 times the period", one["range_s"], [0.18, 1.8], 1e-12),
        close("1.5 S_DS at the plateau", np.max(good["spectra"]["target_m_per_s2"]), 1.5 * GRAVITY, 1e-12),
        check("eleven pairs: no clause fails", fails(good) == []),
        check("ten fail the number alone", fails(ten) == ["ASCE/SEI 7-16, 16.2.2"]),
        check("single records are refused", alone.returncode == 2 and "A+B" in alone.stderr),
    ]


def refusals(pilotis, folder):
    write_record(folder / "r.txt", noise(1))
    good = []
    for arguments, part in [
        (["scale", "r.txt", *RANGE], "--target"),
        (["scale", "r.txt", *TARGET], "--from"),
        (["scale", "none.txt", *TARGET, *RANGE], "none.txt"),
        (["scale", "r.txt", "--target", "en_1999", *RANGE], "en_1998"),
        (["scale", "r.txt", "--target", "en_1998", "--ag", "3", *RANGE], "--type"),
        (["scale", "r.txt", *TARGET, "--from", "0.2", "--to", "5"], "4 s"),
        (["scale", "r.txt", *TARGET, *RANGE, "--code", "en_1998"], "--period"),
        (["select", "r.txt", "-n", "2", *TARGET, *RANGE], "2 motions"),
        (["match", "r.txt", *TARGET, "--from", "0.01", "--to", "2", "-o", "m.csv"], "two steps"),
        (["scale", "r.txt", "--target", "asce_7_16_mcer", "--s-ds", "10", "--s-d1", "6", "--t-l", "8", "--damping", "0.02", *RANGE],
         "--damping"),
    ]:
        run = fit(pilotis, folder, *arguments)
        good.append(check(f"{' '.join(arguments)[:60]}: {run.stderr.strip()[:110]}", run.returncode == 2 and part in run.stderr))
    return good + [check("nothing is written", sorted(p.name for p in folder.iterdir()) == ["r.txt"])]


def main(pilotis, name):
    with tempfile.TemporaryDirectory() as folder:
        good = globals()[name](pathlib.Path(pilotis).resolve(), pathlib.Path(folder))
    return 0 if good and all(good) else 1


if __name__ == "__main__":
    sys.exit(main(*sys.argv[1:]))
