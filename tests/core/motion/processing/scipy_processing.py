"""Filters, tapers, resampling and measures of random records, against SciPy and NumPy.

References: scipy.signal.butter and sosfilt, detrend, windows.tukey, resample; numpy.fft.rfft; scipy.integrate.
Tolerances are error estimates, stated at each check; eps is the rounding of a double.
Usage: scipy_processing.py MOTION_FILTER SEED
"""

import subprocess
import sys

import numpy as np
from scipy import signal

EPS = np.finfo(float).eps
ACAUSAL, CAUSAL = 0, 1
G = 9.80665


class Program:
    def __init__(self, path):
        self.path = path
        self.failed = False

    def lines(self, words, step, samples):
        text = "\n".join(repr(float(v)) for v in [step, *samples])
        done = subprocess.run([self.path, *map(str, words)], input=text, capture_output=True, text=True, check=True)
        return done.stdout.split("\n")[:-1]

    def process(self, step, samples, *words):
        return np.array([float(line) for line in self.lines(["process", *words], step, samples)])

    def check(self, what, got, expected, tolerance):
        """Largest difference over the largest expected magnitude."""
        same_size = np.shape(got) == np.shape(expected)
        error = np.abs(got - expected).max() / np.abs(expected).max() if same_size else np.inf
        print(f"{what}: {error:.2e}, allowed {tolerance:.2e}")
        self.failed |= not error <= tolerance


def both_ways(sos, samples):
    return signal.sosfilt(sos, signal.sosfilt(sos, samples)[::-1])[::-1]


def filters(program, rng, step, samples):
    """A coefficient wrong by eps moves a pole at distance d from z = 1 by up to eps / d, relative eps / d^2; d is about
    2 pi f step at the low corner. Allowed: ten times that, for each of the up to 2 n sections and two passes."""
    nyquist = 0.5 / step
    for order in range(1, 9):
        low, high = rng.uniform(0.05, 1.0), rng.uniform(0.2, 0.9) * nyquist
        for name, kind, corners in (("highpass", "highpass", [low]), ("lowpass", "lowpass", [high]),
                                    ("bandpass", "bandpass", [low, high])):
            sos = signal.butter(order, corners if len(corners) > 1 else corners[0], kind, fs=1 / step, output="sos")
            closest = min(corners[0], 0.1 * nyquist)
            tolerance = 10 * EPS / (2 * np.pi * closest * step) ** 2 * 4 * order
            for way, expected in ((CAUSAL, signal.sosfilt(sos, samples)), (ACAUSAL, both_ways(sos, samples))):
                got = program.process(step, samples, name, *corners, order, way)
                program.check(f"{name} {np.round(corners, 3)} Hz, order {order}, {['acausal', 'causal'][way]}", got,
                              expected, tolerance)


def simple_steps(program, step, samples):
    """Sums of n terms: rounding up to n eps."""
    n = len(samples)
    rounding = n * EPS
    program.check("remove_mean", program.process(step, samples, "remove_mean"), signal.detrend(samples, type="constant"),
                  rounding)
    program.check("remove_trend", program.process(step, samples, "remove_trend"), signal.detrend(samples), rounding)
    program.check("taper", program.process(step, samples, "taper", 0, 0, 0.13),
                  samples * signal.windows.tukey(n, 0.26), rounding)


def resampling(program, rng):
    """Both sides transform zeros of the same number behind the record; log2(n) eps of an FFT, times ten."""
    n = 400  # twice this is a multiple of every ratio below with a fast size
    step = 0.02
    for up, down in ((2, 1), (4, 1), (5, 4), (1, 2), (4, 5), (1, 4)):
        # SciPy treats the amplitude exactly at the new Nyquist frequency as it pleases: none is left there.
        sos = signal.butter(8, 0.3 * min(1, up / down), fs=1, output="sos")
        samples = both_ways(sos, rng.normal(0, 1, n) * signal.windows.tukey(n, 0.5))
        padded = np.concatenate([samples, np.zeros(n)])
        spectrum = np.fft.rfft(padded)
        if up < down:
            spectrum[n * up // down] = 0
        padded = np.fft.irfft(spectrum)
        expected = signal.resample(padded, 2 * n * up // down)
        new_step = step * down / up
        count = int(np.floor((n - 1) * step / new_step * (1 + 1e-12))) + 1
        got = program.process(step, samples, "resample", new_step, 0)
        program.check(f"resample {step} to {new_step} s", got, expected[:count], 10 * np.log2(2 * n) * EPS)


def fine(step, samples, parts):
    """The record as marched (linear, back to 0 after the last sample) at `parts` points a step."""
    times = np.arange(len(samples) + 1) * step
    fine_times = np.linspace(0, times[-1], len(samples) * parts + 1)
    return fine_times, np.interp(fine_times, times, np.append(samples, 0))


def measures(program, step, samples):
    """Simpson's rule is exact for the square of a straight line and for its integral, trapezoids are for velocity:
    rounding only."""
    found = dict(line.split() for line in program.lines(["measures"], step, samples))
    parts = 64
    t, a = fine(step, samples, parts)
    h = t[1]
    simpson = lambda y: h / 3 * (y[0] + 4 * y[1:-1:2].sum() + 2 * y[2:-1:2].sum() + y[-1])
    velocity = np.concatenate([[0], np.cumsum((a[1:] + a[:-1]) * h / 2)])
    # v is a parabola in each fine step: Simpson with the middle value from the parabola.
    middle = velocity[:-1] + h * (3 * a[:-1] + a[1:]) / 8
    displacement = np.concatenate([[0], np.cumsum(h / 6 * (velocity[:-1] + 4 * middle + velocity[1:]))])
    rounding = len(t) * EPS
    square = simpson(a ** 2)
    expected = {
        "pga": (np.abs(samples).max(), EPS), "pgv": (np.abs(velocity[::parts]).max(), rounding),
        "pgd": (np.abs(displacement[::parts]).max(), 100 * rounding), "arias": (np.pi / (2 * G) * square, rounding),
        "rms": (np.sqrt(square / t[-1]), rounding),
    }
    # |a| is straight between the samples and the zeros between them.
    right = np.append(samples[1:], 0)
    crossed = samples * right < 0
    zeros = step * (np.arange(len(samples)) + samples / np.where(crossed, samples - right, 1))[crossed]
    corners = np.sort(np.concatenate([t[::parts], zeros]))
    heights = np.abs(np.interp(corners, t[::parts], np.append(samples, 0)))
    expected["cav"] = (np.trapz(heights, corners), rounding)
    for name, (value, tolerance) in expected.items():
        program.check(name, np.array([float(found[name])]), np.array([value]), tolerance)
    check_mean_period(program, step, samples, float(found["mean_period"]))
    check_fourier(program, step, samples)


def check_fourier(program, step, samples):
    rows = np.array([line.split() for line in program.lines(["fourier", 0.05], step, samples)], float)
    size = int(round(1 / (rows[1, 0] * step)))
    program.check("Fourier amplitudes", rows[:, 1], step * np.abs(np.fft.rfft(samples, size)), 10 * np.log2(size) * EPS)
    program.check("their frequencies", rows[:, 0], np.fft.rfftfreq(size, step), 4 * EPS)


def check_mean_period(program, step, samples, got):
    size = int(np.ceil(20 / step))
    size = max(size, len(samples))
    while any_large_factor(size):
        size += 1
    f, c = np.fft.rfftfreq(size, step), np.abs(np.fft.rfft(samples, size))
    inside = (f >= 0.25 - 1e-9) & (f <= 20 + 1e-9)
    expected = (c[inside] ** 2 / f[inside]).sum() / (c[inside] ** 2).sum()
    program.check("mean_period", np.array([got]), np.array([expected]), size * EPS)


def any_large_factor(size):
    for factor in (2, 3, 5):
        while size % factor == 0:
            size //= factor
    return size > 1


def main(path, seed):
    rng = np.random.default_rng(int(seed))
    program = Program(path)
    step = float(rng.choice([0.005, 0.01, 0.02]))
    n = int(rng.integers(900, 2500))
    samples = rng.normal(0, 1.5, n) * np.sin(np.pi * np.arange(n) / n)
    filters(program, rng, step, samples)
    simple_steps(program, step, samples + rng.normal())
    resampling(program, rng)
    measures(program, step, samples)
    return 1 if program.failed else 0


if __name__ == "__main__":
    sys.exit(main(*sys.argv[1:]))
