"""`pilotis motion` as a user runs it, against closed forms, NumPy and SciPy.

python3 motion_run.py PROGRAM CHECK. Closed forms of the oscillator: Chopra, Dynamics of Structures, ch. 3, 4 and 6
(from memory), each derived beside its use. Tolerances: what the linear course between samples makes of a smooth
curve, (omega h)^2 / 12 of an integral; the step rule of core/motion/spectra/oscillator.hpp, 1 - cos(pi / 40) = 0.31 %
of a peak; else rounding.
"""
import csv
import fcntl
import json
import math
import os
import pathlib
import pty
import re
import struct
import subprocess
import sys
import tempfile
import termios
import xml.etree.ElementTree

import numpy
from scipy import integrate, signal

PROGRAM = sys.argv[1]
G = 9.80665
MISSED = 1 - math.cos(math.pi / 40)  # of a peak, at most


def write_record(file, samples, step):
    """m/s2, every digit written, so that the program has the very same numbers."""
    lines = ["# units: m/s2", f"# step: {step!r} s", "# first sample at: 0 s", *(repr(float(a)) for a in samples)]
    file.write_text("\n".join(lines) + "\n")
    return str(file)


def invented(seed, count=600):
    """Noise under a half sine, invented."""
    draw = numpy.random.default_rng(seed)
    return 2 * draw.standard_normal(count) * numpy.sin(numpy.pi * numpy.arange(count) / count)


def motion(*arguments, status=0, **more):
    done = subprocess.run([PROGRAM, "motion", *map(str, arguments)], capture_output=True, text=True, timeout=300, **more)
    assert done.returncode == status, (arguments, done.returncode, done.stderr, done.stdout[-500:])
    return done


def told(*arguments, status=0):
    return json.loads(motion(*arguments, "--json", status=status).stdout)


def close(found, wanted, relative, what):
    found, wanted = numpy.asarray(found, float), numpy.asarray(wanted, float)
    wrong = numpy.max(numpy.abs(found - wanted) / numpy.maximum(numpy.abs(wanted), 1e-300))
    assert wrong <= relative, (what, wrong, relative, found, wanted)


def sine(folder):
    """a = A sin(w t), N whole cycles from rest: v = A/w (1 - cos w t), d = A/w (t - sin(w t)/w)."""
    amplitude, frequency, cycles, per_cycle = 1.7, 2.0, 20, 200
    step, w, length = 1 / frequency / per_cycle, 2 * math.pi * frequency, cycles / frequency
    n = numpy.arange(cycles * per_cycle + 1)
    file = write_record(folder / "sine.csv", amplitude * numpy.sin(2 * numpy.pi * n / per_cycle), step)
    measures = told(file)["records"][0]["measures"]
    smooth = (w * step) ** 2 / 12 * 1.01 + 1e-12
    close(measures["pga"], amplitude, 1e-12, "PGA")
    close(measures["pgv"], 2 * amplitude / w, smooth, "PGV")
    close(measures["pgd"], amplitude * length / w, smooth, "PGD")
    close(measures["pgv_pga"], 2 / w, smooth, "PGV / PGA")
    # The square of a chord errs twice as much as the chord.
    close(measures["arias"], math.pi / (2 * G) * amplitude**2 * length / 2, 2 * smooth, "Arias")
    close(measures["cav"], 4 * amplitude * cycles / w, smooth, "CAV")
    # The record returns to zero one step after its last sample: (length + step) is the span of the mean.
    close(measures["rms"], amplitude * math.sqrt(length / (length + step) / 2), smooth, "rms")
    # Energy grows evenly but for a wave of 1/(2 w): the shares 5, 75 and 95 % are whole cycles here.
    close(measures["duration_5_75"], 0.7 * length, 2 * step / length, "5 to 75 %")
    close(measures["duration_5_95"], 0.9 * length, 2 * step / length, "5 to 95 %")
    # |a| >= 0.05 g from asin(0.05 g / A) / w after the start to as long before the end; whole steps inside.
    quiet = math.ceil(math.asin(0.05 * G / amplitude) / w / step) * step
    close(measures["duration_bracketed"], length - 2 * quiet, 1e-9, "bracketed")
    # Resonance: an undamped oscillator of the sine's own period after N cycles: u = A/(2 w^2) (sin w t - w t cos w t),
    # PSA = A w length / 2 at the end, which the free vibration keeps.
    spectrum = told(file, "--spectrum", "--damping", "0", "--periods", 1 / frequency)["records"][0]["spectrum"][0]
    close(spectrum["pseudo_acceleration_m_per_s2"][0], amplitude * w * length / 2, smooth, "resonance")


def pulse(folder):
    """A rectangle of length d whose flanks take one step h: a rectangle convolved with one of width h. Without damping the
    vibration after it has the amplitude A/w^2 times 2 |sin(w d / 2)| sin(w h / 2) / (w h / 2), and for T > 2 d the peak
    lies there (Chopra ch. 4.4; the second factor is the transform of the flank)."""
    step, count, amplitude = 0.01, 30, 2.5
    samples = [0.0] + [amplitude] * count + [0.0] * 5
    d = count * step
    file = write_record(folder / "pulse.csv", samples, step)
    periods = [0.7, 1.0, 2.0, 5.0]
    record = told(file, "--spectrum", "--histories", "--damping", "0", "--periods",
                  ",".join(map(str, periods)))["records"][0]
    w = 2 * numpy.pi / numpy.array(periods)
    wanted = amplitude / w**2 * 2 * numpy.abs(numpy.sin(w * d / 2)) * numpy.sin(w * step / 2) / (w * step / 2)
    curve = record["spectrum"][0]
    close(curve["displacement_m"], wanted, 1e-10, "SD")
    close(curve["pseudo_velocity_m_per_s"], w * wanted, 1e-10, "PSV")
    close(curve["pseudo_acceleration_m_per_s2"], w**2 * wanted, 1e-10, "PSA")
    close(record["measures"]["pgv"], amplitude * d, 1e-12, "PGV: the area")
    # A damped rigid oscillator rides on the ground.
    rigid = told(file, "--spectrum", "--periods", "0")["records"][0]["spectrum"][0]
    close(rigid["acceleration_m_per_s2"], amplitude, 1e-15, "T = 0")
    assert rigid["displacement_m"] == [0]


def against_scipy(folder):
    """Spectra by scipy.signal.lsim (exact for a linear course) on a grid 400 to the period, histories by
    scipy.integrate, Fourier amplitudes by the defining sum."""
    step = 0.01
    a = invented(5)
    file = write_record(folder / "noise.csv", a, step)
    record = told(file, "--spectrum", "--histories", "--fourier", "--periods", "0.1,0.5,2", "--damping",
                  "2%,0.05")["records"][0]
    times = step * numpy.arange(len(a))
    for curve, zeta in zip(record["spectrum"], (0.02, 0.05)):
        assert curve["damping_ratio"] == zeta
        for i, period in enumerate(curve["period_s"]):
            w = 2 * numpy.pi / period
            # Seen at the ends of steps h only, a peak is missed by h^2 / 8 times its second derivative at most.
            h = step / math.ceil(40 * step / period)
            pieces = 40  # the record's step in as many, h a multiple of them; 1 - cos(pi / 400) of a peak at most
            fine = step / pieces * numpy.arange(int((len(a) + 1 + period / step) * pieces))
            ground = numpy.interp(fine, numpy.append(times, times[-1] + step), numpy.append(a, 0))
            states = ([[0, 1], [-w * w, -2 * zeta * w]], [[0], [-1]], [[1, 0], [0, 1], [-w * w, -2 * zeta * w]],
                      [[0], [0], [0]])
            responses = signal.lsim(states, ground, fine)[1].T
            for name, response in zip(("displacement_m", "velocity_m_per_s", "acceleration_m_per_s2"), responses):
                peak = numpy.abs(response).max()
                missed = h**2 / 8 * numpy.abs(numpy.diff(response, 2)).max() / (step / pieces) ** 2
                assert peak - missed <= curve[name][i] <= (1 + 4e-5) * peak, (name, period, zeta, peak, missed)
            close(curve["pseudo_acceleration_m_per_s2"][i], w**2 * curve["displacement_m"][i], 1e-12, "PSA")
    histories = record["histories"]
    whole = numpy.append(a, 0)
    velocity = integrate.cumulative_trapezoid(whole, dx=step, initial=0)
    parts = velocity[:-1] * step + (2 * whole[:-1] + whole[1:]) * step**2 / 6
    displacement = numpy.append(0, numpy.cumsum(parts))
    assert histories["step_s"] == step and numpy.array_equal(histories["acceleration_m_per_s2"], whole)
    for name, wanted in (("velocity_m_per_s", velocity), ("displacement_m", displacement)):
        assert numpy.max(numpy.abs(numpy.array(histories[name]) - wanted)) <= 1e-12 * numpy.abs(wanted).max(), name
    frequencies = numpy.array(record["fourier"]["frequency_Hz"])
    wanted = step * numpy.abs(numpy.exp(-2j * numpy.pi * numpy.outer(frequencies, times)) @ a)
    assert numpy.max(numpy.abs(record["fourier"]["amplitude_m_per_s"] - wanted)) <= 1e-11 * wanted.max()
    assert frequencies[0] == 0 and numpy.diff(frequencies).max() <= (1 + 1e-9) / (len(a) * step)


def rotated(folder):
    """One motion along 30 degrees: RotD100 is its own spectrum, and RotD50 that times the median of |cos| over the 180
    directions (Boore 2010)."""
    a, step, angle = invented(6), 0.01, math.radians(30)
    first = write_record(folder / "first.csv", math.cos(angle) * a, step)
    second = write_record(folder / "second.csv", math.sin(angle) * a, step)
    along = write_record(folder / "along.csv", a, step)
    options = ["--periods", "0,0.2,1,3", "--damping", "0.05"]
    rotd = told("--rotd", first, second, *options)["rotd"]["spectra"][0]
    own = told(along, "--spectrum", *options)["records"][0]["spectrum"][0]["pseudo_acceleration_m_per_s2"]
    median = numpy.median(numpy.abs(numpy.cos(numpy.radians(numpy.arange(180)))))
    close(rotd["rotd100_pseudo_acceleration_m_per_s2"], own, 1e-9, "RotD100")
    close(rotd["rotd50_pseudo_acceleration_m_per_s2"], median * numpy.array(own), 1e-9, "RotD50")
    assert rotd["direction_of_rotd100_degree"] == [30] * 4, rotd["direction_of_rotd100_degree"]
    shorter = write_record(folder / "shorter.csv", a[:-10], step)
    for files in ((first,), (first, second, along), (first, shorter)):
        done = motion("--rotd", *files, *options, status=2)
        assert "--rotd" in done.stderr, done.stderr


def inelastic(folder):
    """Ductility 1 needs the elastic strength; the strength found for a ductility gives that ductility; a strength that is
    never reached leaves the oscillator elastic (ductility = elastic strength over strength, Chopra ch. 7)."""
    file = write_record(folder / "noise.csv", invented(7), 0.01)
    options = ["--periods", "0,0.3,0.8,2", "--spectrum"]

    def points(held):
        record = told(file, "--inelastic", held, *options)["records"][0]
        assert [p["period_s"] for p in record["inelastic"][0]["points"]] == [0.3, 0.8, 2]
        return record["inelastic"][0]["points"]

    for point in points("ductility=1"):
        close(point["strength_ratio"], 1, 1e-9, "ductility 1")
    for point in points("ductility=4,post_yield_ratio=0.05"):
        assert point["found"] in ("one", "largest of several"), point
        close(point["ductility"], 4, 1e-4, "the ductility asked for")
        again = [p for p in points(f"strength_ratio={point['strength_ratio']!r},post_yield_ratio=0.05")
                 if p["period_s"] == point["period_s"]][0]
        close(again["ductility"], point["ductility"], 1e-9, "the same strength by its ratio")
        again = [p for p in points(f"strength={point['yield_acceleration_m_per_s2']!r},post_yield_ratio=0.05")
                 if p["period_s"] == point["period_s"]][0]
        close(again["ductility"], point["ductility"], 1e-9, "the same strength by itself")
    elastic = told(file, *options)["records"][0]["spectrum"][0]["pseudo_acceleration_m_per_s2"][1:]
    for point, psa in zip(points("strength=50 g"), elastic):
        # 200 steps a period instead of 40.
        close(point["ductility"], psa / (50 * G), MISSED, "elastic")


def rows_of(file):
    with open(file, newline="") as text:
        return list(csv.reader(text))


def many(folder):
    """Fifty files by four threads, by one, and one by one: the same bytes."""
    files = [write_record(folder / f"quay-{i:02}.csv", invented(i, 300 + 37 * (i % 7)), 0.01) for i in range(50)]
    options = ["--spectrum", "--histories", "--fourier", "--inelastic", "strength=1", "--periods", "0.1:4:9"]
    kinds = ("", "-spectrum", "-histories", "-fourier", "-inelastic")
    texts = []
    for threads in (4, 1):
        texts.append(motion(folder / "quay-*.csv", "--csv", folder / f"all{threads}.csv", "-t", threads, *options).stdout)
    assert texts[0] == texts[1]
    for kind in kinds:
        assert (folder / f"all4{kind}.csv").read_bytes() == (folder / f"all1{kind}.csv").read_bytes(), kind
    together = rows_of(folder / "all4.csv")
    assert [row[0] for row in together[1:]] == files
    single = {kind: [] for kind in kinds}
    for file in files:
        motion(file, "--csv", folder / "one.csv", "--no-plot", *options)
        for kind in kinds:
            rows = rows_of(folder / f"one{kind}.csv")
            single[kind] = single[kind] or rows[:1]
            single[kind] += rows[1:]
    for kind in kinds:
        assert single[kind] == rows_of(folder / f"all4{kind}.csv"), kind
    table = motion(*files, "--measures", "pga,arias").stdout.splitlines()
    assert len(table) == 2 + 50 and table[2].split()[0] == "quay-00.csv", table[:4]
    close(float(table[2].split()[1]), float(together[1][together[0].index("pga [m/s2]")]) / G, 5e-4, "four digits")


def damaged(folder):
    """Bad files among good ones: told of, counted, and the good ones unharmed."""
    good = [write_record(folder / f"good-{i}.csv", invented(i), 0.01) for i in range(4)]
    broken = folder / "broken.csv"
    broken.write_text(pathlib.Path(good[0]).read_text().replace("\n", "\n0.1x\n", 20))
    empty = folder / "empty.csv"
    empty.write_text("")
    no_step = folder / "no-step.csv"
    no_step.write_text("# units: g\n0.1\n0.2\n0.1\n")
    bad = [str(broken), str(empty), str(folder / "absent.csv"), str(no_step), str(folder / "none-*.csv")]
    mixed = [bad[0], good[0], bad[1], good[1], bad[2], good[2], bad[3], bad[4], good[3]]
    done = motion(*mixed, "--csv", folder / "mixed.csv", "-t", 3, status=2)
    motion(*good, "--csv", folder / "good.csv")
    assert (folder / "mixed.csv").read_bytes() == (folder / "good.csv").read_bytes()
    told_of = [line for line in done.stderr.splitlines() if line.startswith("pilotis: ")]
    assert len(told_of) == 5 and all(name in line for name, line in zip(bad, told_of)), done.stderr
    data = told(*mixed, status=2)
    assert [record["file"] for record in data["records"]] == good
    assert [failure["file"] for failure in data["failed"]] == bad and all(f["found"] for f in data["failed"])
    assert not [f for f in os.listdir(folder) if "partial" in f or f.startswith(".")], os.listdir(folder)
    # The same file with its step stated is good.
    assert told(no_step, "--step", "0.02")["records"][0]["step_s"] == 0.02


SVG = "{http://www.w3.org/2000/svg}"


def picture(folder):
    """Well-formed XML with the four pictures, their titles, units and peaks; names that XML would stumble over."""
    a = invented(3)
    a[200] = 9.0
    file = write_record(folder / "a & b <1>.csv", a, 0.01)
    motion(file, "--svg", folder / "one.svg", "--no-plot")
    tree = xml.etree.ElementTree.parse(folder / "one.svg").getroot()
    assert tree.tag == SVG + "svg" and tree.find(SVG + "title").text == "a & b <1>.csv"
    texts = [text.text for text in tree.iter(SVG + "text")]
    assert texts.count("a & b <1>.csv") == 4 and f"peak {9 / G:.3g} g at 2 s" in texts, texts
    for wanted in ("acceleration (g)", "velocity (m/s)", "displacement (m)", "time (s)", "pseudo-acceleration (g)",
                   "period (s)", "Response spectrum, 5 % damped"):
        assert wanted in texts, (wanted, texts)
    assert len(list(tree.iter(SVG + "path"))) == 4
    width, height = (float(tree.get(side)) for side in ("width", "height"))
    for path in tree.iter(SVG + "path"):
        x, y = numpy.array([list(map(float, p.split())) for p in re.split("[ML]", path.get("d"))[1:]]).T
        assert 0 < x.min() and x.max() < width and 0 < y.min() and y.max() < height and len(x) <= 4 * width
    files = [write_record(folder / f"dock-{i}.csv", invented(i), 0.01) for i in range(3)]
    motion(*files, "--svg", folder / "three.svg", "--fourier", "--inelastic", "ductility=2", "--periods", "0.2,0.5,1")
    tree = xml.etree.ElementTree.parse(folder / "three.svg").getroot()
    assert len(list(tree.iter(SVG + "path"))) == 3 * 3 + 3 + 3 + 3
    files += [write_record(folder / f"pier-{i}.csv", invented(i), 0.01) for i in range(9)]
    motion(*files, "--svg", folder / "many.svg")
    texts = [t.text for t in xml.etree.ElementTree.parse(folder / "many.svg").getroot().iter(SVG + "text")]
    assert {"12 records", "median", "16th percentile", "84th percentile"} <= set(texts), texts


def on_terminal(arguments, columns, **environment):
    """What the program puts on a terminal of that width."""
    leader, follower = pty.openpty()
    fcntl.ioctl(follower, termios.TIOCSWINSZ, struct.pack("HHHH", 50, columns, 0, 0))
    inherited = {k: v for k, v in os.environ.items() if k not in ("NO_COLOR", "LC_ALL", "LC_CTYPE", "LANG")}
    child = subprocess.Popen([PROGRAM, "motion", *map(str, arguments)], stdout=follower, stderr=subprocess.DEVNULL,
                             env={**inherited, "TERM": "xterm-256color", "LANG": "C.UTF-8", **environment})
    os.close(follower)
    text = b""
    while True:
        try:
            part = os.read(leader, 65536)
        except OSError:
            break
        if not part:
            break
        text += part
    assert child.wait() == 0
    return text.decode().replace("\r\n", "\n")


def screen(folder):
    """Within the terminal's width, colors only where wanted, ASCII where the locale is."""
    files = [write_record(folder / f"dock-{i}.csv", invented(i), 0.01) for i in range(3)]
    escape = re.compile("\x1b\\[[0-9;]*m")
    for arguments in ([files[0]], [*files, "--plot"], files):
        for columns in (80, 100, 143):
            text = escape.sub("", on_terminal(arguments, columns))
            assert max(map(len, text.splitlines())) <= columns, (arguments, columns)
    colored = on_terminal([*files, "--plot"], 100)
    assert escape.search(colored) and re.search("[\u2801-\u28ff]", colored)
    plain = on_terminal([*files, "--plot"], 100, NO_COLOR="1")
    assert "\x1b" not in plain and re.search("[\u2801-\u28ff]", plain)
    ascii_only = on_terminal([files[0]], 80, LC_ALL="C")
    assert escape.sub("", ascii_only).isascii() and "acceleration (g) over time (s)" in ascii_only
    # The table that does not fit goes on below: every record once in each block, every measure once.
    table = on_terminal(files, 80)
    assert table.count("dock-0.csv") == table.count("record") >= 2
    assert "\x1b" not in motion(files[0]).stdout


def wrong(folder):
    """Status 2, a reason, and no file."""
    file = write_record(folder / "good.csv", invented(1), 0.01)
    for arguments in ([], [file, "--measures", "pgx"], [file, "--periods", "1:0.1:5"], [file, "--periods", "x"],
                      [file, "--periods", "0.1:1"], [file, "--periods", "0.1:1:1.5"], [file, "--periods", "-1"],
                      [file, "--periods", "nan", "--spectrum"], [file, "--damping", "1"], [file, "--damping", "5 m"],
                      [file, "--inelastic", "4"], [file, "--inelastic", "ductility=0.5"],
                      [file, "--inelastic", "ductility=4,strength=1"], [file, "--inelastic", "strength=1 m"],
                      [file, "--inelastic", "post_yield_ratio=0.1"], [file, "--inelastic", "ductility=4,post_yield_ratio=1"],
                      [file, "--units", "kN"], [file, "--step", "0"], [file, "--threads", "0"], [file, "--strange"],
                      [file, "--step", "0.02"]):
        done = motion(*arguments, "--csv", folder / "x.csv", "--svg", folder / "x.svg", status=2)
        assert done.stderr.strip(), arguments
        assert not (folder / "x.svg").exists(), arguments
    listed = motion("--list").stdout
    for name in told(file)["measure_units"]:
        assert f"{name} (" in listed, name
    no_folder = motion(file, "--csv", folder / "no" / "x.csv", status=4)
    assert "x.csv" in no_folder.stderr


def main():
    with tempfile.TemporaryDirectory() as folder:
        globals()[sys.argv[2]](pathlib.Path(folder))


main()
