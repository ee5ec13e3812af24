"""The figures of a batch, whole processes, each check before its time. Run by hand where little else runs:

    python3 tests/bench/batch_bench.py build/apps/pilotis [SHARED]

SHARED is a folder with reference/elcentro-1940-ns.txt; without it an invented record of the same length stands in.
Prints medians of several runs; rivals are measured in between. Needs Debian's python3-h5py, python3-numpy.
"""
import pathlib
import random
import resource
import shutil
import statistics
import subprocess
import sys
import tempfile
import time

import h5py
import numpy

PROGRAM = str(pathlib.Path(sys.argv[1]).resolve())
SHARED = pathlib.Path(sys.argv[2]) if len(sys.argv) > 2 else None
STORIES, DT, DURATION = 20, 0.005, 31.2
TRIES = 5


def record():
    file = SHARED / "reference/elcentro-1940-ns.txt" if SHARED else None
    if file and file.exists():
        return [float(line) for line in file.read_text().splitlines() if line and not line.startswith("#")]
    draw = random.Random(1)
    return [0.1 * draw.gauss(0, 1) for _ in range(1559)]


def write_study(folder, factors, motions=1, stories=STORIES, duration=DURATION, keep="histories = \"none\"", check="false", samples=None):
    folder.mkdir(parents=True, exist_ok=True)
    for i in range(motions):
        text = "\n".join(f"{a * (1 + i / 1000):.6f}" for a in (samples or record())) + "\n"
        (folder / f"motion-{i:04}.csv").write_text(text)
    tables = "".join(f"""[[story]]
height = "3.5 m"
mass = "400 t"
spring = {{ law = "bilinear", stiffness = {9e8 - 3e7 * i:.6g}, yield_shear = {9.5e6 * (1 - 0.04 * i):.6g}, post_yield_ratio = 0.03 }}
""" for i in range(stories))
    study = folder / "study.toml"
    study.write_text(f"""title = "Invented tower"
[units]
force = "N"
length = "m"
[building]
kind = "stick"
damping = {{ kind = "rayleigh", mass_factor = 0.2, stiffness_factor = 0.002 }}
{tables}
[suite]
motions = ["motion-*.csv"]
units = "g"
step = 0.02
factors = {factors}
[march]
step = {DT}
duration = {duration}
error_check = {check}
[keep]
{keep}
""")
    return study


def timed(command, good=(0, 1)):
    begin = time.perf_counter()
    done = subprocess.run(command, capture_output=True, text=True)
    seconds = time.perf_counter() - begin
    assert done.returncode in good, done.stdout + done.stderr
    return seconds


def run(study, output, *options, prefix=()):
    return timed([*prefix, PROGRAM, "run", str(study), "-o", str(output), "-q", *options])


def spread(values):
    return f"median {statistics.median(values):.4g} (of {len(values)}: {min(values):.4g} to {max(values):.4g})"


def numpy_loop(samples, factor):
    """The same scheme, Newton and all, as one writes it with NumPy: whole-array operations over the stories and a banded
    solve. Gives the peak drifts, m."""
    from scipy.linalg import solve_banded
    i = numpy.arange(STORIES)
    mass, k, f_y, r = 4e5, 9e8 - 3e7 * i, 9.5e6 * (1 - 0.04 * i), 0.03
    slider, strength = (1 - r) * k, (1 - r) * f_y
    above = numpy.append(k[1:], 0.0)
    damping_diagonal, damping_off = 0.2 * mass + 0.002 * (k + above), -0.002 * k[1:]
    times = numpy.arange(int(round(DURATION / DT)) + 1) * DT
    ground = factor * 9.80665 * numpy.interp(times, 0.02 * numpy.arange(len(samples) + 1),
                                             [*(round(a, 6) for a in samples), 0])
    u = numpy.zeros(STORIES); v = u.copy(); slip = u.copy(); a = -ground[0] * numpy.ones(STORIES)
    peaks = u.copy()
    c_k, c_c = DT * DT / 4, DT / 2
    band = numpy.zeros((3, STORIES))
    for g in ground[1:]:
        a1 = a.copy()
        u_fixed, v_fixed = u + DT * v + c_k * a, v + c_c * a
        for _ in range(25):
            u1, v1 = u_fixed + c_k * a1, v_fixed + c_c * a1
            drift = numpy.diff(u1, prepend=0)
            elastic = slider * (drift - slip)
            bounded = numpy.clip(elastic, -strength, strength)
            slips = numpy.abs(elastic) > strength
            force = r * k * drift + bounded
            damping = damping_diagonal * v1
            damping[:-1] += damping_off * v1[1:]
            damping[1:] += damping_off * v1[:-1]
            residual = -mass * (g + a1) - force - damping
            residual[:-1] += force[1:]
            if numpy.abs(residual).max() < 1e-9 * 4e5 * 20:
                break
            tangent = r * k + numpy.where(slips, 0, slider)
            band[1] = mass + c_c * damping_diagonal + c_k * (tangent + numpy.append(tangent[1:], 0))
            band[0, 1:] = band[2, :-1] = c_c * damping_off - c_k * tangent[1:]
            a1 = a1 + solve_banded((1, 1), band, residual, check_finite=False)
        slip = numpy.where(slips, drift - bounded / slider, slip)
        u, v, a = u1, v1, a1
        peaks = numpy.maximum(peaks, numpy.abs(drift))
    return peaks


def march_rate(folder):
    factors = [round(1.5 + i / 256, 6) for i in range(256)]
    study, output = write_study(folder / "rate", factors), folder / "rate.h5"
    run(study, output, "-t", "1")
    with h5py.File(output) as h5:
        ours = numpy.abs(h5["/peaks/drift"][0])
    begin = time.perf_counter()
    theirs = numpy_loop(record(), factors[0])
    numpy_seconds = time.perf_counter() - begin
    assert numpy.allclose(ours, theirs, rtol=1e-6), (ours, theirs)
    march, whole = [], []
    for _ in range(TRIES):
        whole.append(run(study, output, "-t", "1"))
        with h5py.File(output) as h5:
            march.append(float(h5["/runs/wall_time"][()].sum()))
    work = 256 * STORIES * DURATION / DT
    print(f"256 runs, 1 thread: march {spread([work / s for s in march])} story-steps/s; whole process {spread(whole)} s")
    print(f"NumPy loop of one run: {numpy_seconds:.3g} s, {numpy_seconds / (statistics.median(whole) / 256):.0f} times "
          "a run of the whole process")


def scaling(folder):
    study = write_study(folder / "scaling", [round(1 + i / 1024, 6) for i in range(1024)])
    run(study, folder / "scaling.h5")
    pairs = {"2 threads": ("-t", "2"), "2 ranks": ("-t", "1")}
    for name, options in pairs.items():
        prefix = ["mpirun", "--allow-run-as-root", "--bind-to", "core", "-n", "2"] if "ranks" in name else []
        ratios = []
        for _ in range(TRIES):
            one = run(study, folder / "scaling.h5", "-t", "1")
            ratios.append(one / run(study, folder / "scaling.h5", *options, prefix=prefix))
        print(f"1024 runs, {name}: {spread(ratios)} times the speed of 1 thread")


def memory(folder):
    peaks = {}
    for runs, motions in ((1000, 10), (100000, 100)):
        factors = [round(0.1 + i * motions / runs, 7) for i in range(runs // motions)]
        study = write_study(folder / f"memory-{runs}", factors, motions=motions, duration=0.5, samples=record()[:25])
        done = subprocess.run(["/usr/bin/time", "-f", "%M", PROGRAM, "run", str(study), "-o",
                               str(folder / f"memory-{runs}.h5"), "-q"], capture_output=True, text=True)
        assert done.returncode in (0, 1), done.stderr
        peaks[runs] = int(done.stderr.split()[-1]) / 1024
    print(f"peak memory: {peaks[1000]:.1f} MiB for 1,000 runs, {peaks[100000]:.1f} MiB for 100,000: "
          f"{peaks[100000] / peaks[1000]:.2f} times")


def overlap(folder):
    """Marching alone, writing alone (a bare h5py write of the same arrays with the same chunks), and both."""
    factors = [round(1 + i / 64, 6) for i in range(64)]
    keep = 'histories = ["drift", "story_shear"]\nevery = 2\ncompression = 4'
    bare = write_study(folder / "bare", factors)
    kept = write_study(folder / "kept", factors, keep=keep)
    run(kept, folder / "kept.h5", "-t", "1")
    rows = []
    for _ in range(3):
        march = run(bare, folder / "bare.h5", "-t", "1")
        both = run(kept, folder / "kept.h5", "-t", "1")
        with h5py.File(folder / "kept.h5") as h5:
            data = [(name, item[()], item.chunks) for run_ in h5["/histories"].values()
                    for name, item in run_.items() if item.ndim == 2]
        begin = time.perf_counter()
        with h5py.File(folder / "copy.h5", "w") as h5:
            for i, (name, values, chunks) in enumerate(data):
                h5.create_dataset(f"{i}-{name}", data=values, chunks=chunks, shuffle=True, compression="gzip",
                                  compression_opts=4)
        write = time.perf_counter() - begin
        rows.append((march, write, both, both / max(march, write)))
    for name, column in zip(("march alone, s", "bare write, s", "both, s", "both over the longer"), zip(*rows)):
        print(f"histories, {name}: {spread(column)}")


def small(folder):
    demo = pathlib.Path(__file__).resolve().parents[2] / "data-demo"
    shutil.copytree(demo, folder / "demo")
    text = (folder / "demo/study.toml").read_text()
    text = text[:text.index("[[limit]]")]
    first = sorted((folder / "demo/motions").glob("*.csv"))[0].name
    study = folder / "demo/one.toml"
    study.write_text(text.replace('"motions/*.csv"', f'"motions/{first}"').replace("[0.5, 1.0]", "[1.0]"))
    seconds = [run(study, folder / "one.h5") for _ in range(21)]
    print(f"one run of the demo building, whole process: {spread([1000 * s for s in seconds])} ms")


def main():
    with tempfile.TemporaryDirectory() as folder:
        for figure in (march_rate, scaling, memory, overlap, small):
            if len(sys.argv) < 4 or figure.__name__ in sys.argv[3:]:
                figure(pathlib.Path(folder))


main()
