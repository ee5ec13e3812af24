"""Spectra of 1,000 invented records of 20,000 samples at 200 periods, as whole processes, each check before its time. Run
by hand where little else runs:

    python3 tests/bench/motion_bench.py build/apps/pilotis build/tests/bench/bench_spectrum [RECORDS]

Against two bounds measured in the same run: the spectrum kernel alone (bench_spectrum, the same grid, samples and step
rule, times the number of cores), and reading alone (the same command asked for the peak only). Needs python3-numpy.
"""
import csv
import json
import os
import pathlib
import statistics
import subprocess
import sys
import tempfile
import time

import numpy

PROGRAM, KERNEL = (str(pathlib.Path(p).resolve()) for p in sys.argv[1:3])
RECORDS = int(sys.argv[3]) if len(sys.argv) > 3 else 1000
SAMPLES, STEP, GRID, PERIODS, TRIES = 20000, 0.005, "0.01:10:200", 200, 3
G = 9.80665


def write_records(folder):
    """Noise under a half sine; the peak of each, m/s2."""
    draw = numpy.random.default_rng(1)
    swell = numpy.sin(numpy.pi * numpy.arange(SAMPLES) / SAMPLES)
    peaks = []
    for i in range(RECORDS):
        values = [f"{a:.6f}" for a in 2 * draw.standard_normal(SAMPLES) * swell]
        (folder / f"quay-{i:05}.csv").write_text(
            "\n".join(["# units: m/s2", f"# step: {STEP} s", "# first sample at: 0 s", *values]) + "\n")
        peaks.append(max(abs(float(v)) for v in values))
    return peaks


def timed(folder, *options):
    begin = time.perf_counter()
    done = subprocess.run([PROGRAM, "motion", str(folder / "*.csv"), "--csv", str(folder / "out/m.csv"), "-q", *options],
                          capture_output=True, text=True)
    seconds = time.perf_counter() - begin
    assert done.returncode == 0, done.stderr
    return seconds


def check(folder, peaks):
    """Every record has its peak, and its spectrum begins there: a stiff oscillator rides on the ground."""
    with open(folder / "out/m.csv", newline="") as file:
        rows = list(csv.reader(file))[1:]
    assert [float(row[-1]) for row in rows] == peaks
    with open(folder / "out/m-spectrum.csv", newline="") as file:
        rows = list(csv.reader(file))[1:]
    assert len(rows) == RECORDS * PERIODS
    first = numpy.array([float(row[8]) for row in rows[::PERIODS]])
    assert (first > 0.5 * numpy.array(peaks)).all()


def kernel_rate():
    """Periods a second of one core, in this run."""
    done = subprocess.run([KERNEL, "--benchmark_filter=whole_spectrum_from_0.01_s/40_steps", "--benchmark_format=json"],
                          capture_output=True, text=True, check=True)
    return max(run["periods/s"] for run in json.loads(done.stdout)["benchmarks"])


def spread(values):
    return f"median {statistics.median(values):.4g} (of {len(values)}: {min(values):.4g} to {max(values):.4g})"


def main():
    cores = len(os.sched_getaffinity(0))
    with tempfile.TemporaryDirectory() as name:
        folder = pathlib.Path(name)
        (folder / "out").mkdir()
        peaks = write_records(folder)
        timed(folder, "--measures", "pga", "--spectrum", "--periods", GRID)
        check(folder, peaks)
        spectra, reading, kernel = [], [], []
        for _ in range(TRIES):
            kernel.append(cores * kernel_rate())
            reading.append(RECORDS / timed(folder, "--measures", "pga"))
            spectra.append(RECORDS / timed(folder, "--measures", "none", "--spectrum", "--periods", GRID))
        whole = statistics.median(spectra) * PERIODS
        print(f"{RECORDS} records of {SAMPLES} samples, {PERIODS} periods, {cores} cores")
        print(f"spectra, whole process: {spread(spectra)} records/s, {whole:.4g} periods/s")
        print(f"reading and the peak alone, whole process: {spread(reading)} records/s")
        print(f"kernel alone on as many cores: {spread(kernel)} periods/s; the whole process reaches "
              f"{whole / statistics.median(kernel):.1%} of it")
        kernel_time, read_time = PERIODS / statistics.median(kernel), 1 / statistics.median(reading)
        print(f"a record takes {1000 * kernel_time:.3g} ms in the kernel and {1000 * read_time:.3g} ms to read: "
              f"{'the kernel' if kernel_time > read_time else 'reading'} bounds it")


main()
