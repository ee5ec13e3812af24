"""A batch as a user runs it: the same result for any number of threads and ranks, after crashes, stops and full disks.

python3 batch_run.py PROGRAM CHECK. No outside source: what is compared is one run of the program with another, array for
array through h5py (wall times and dates excepted).
"""
import json
import math
import os
import pathlib
import random
import shutil
import signal
import subprocess
import sys
import tempfile
import time

import h5py
import numpy

PROGRAM = sys.argv[1]
NOT_COMPLETED, OUTSIDE_FAILED, WRONG_INPUT = 3, 4, 2


def invented_record(seed, samples):
    """Noise under an envelope, m/s2: invented, as good as any for comparing bits."""
    draw = random.Random(seed)
    return [3 * draw.gauss(0, 1) * math.sin(math.pi * i / samples) for i in range(samples)]


def write_study(folder, motions=6, factors=4, stories=6, samples=400, histories="[]", step="0.01", extra=""):
    """Two buildings (the second lower), `motions` records of different length, factors up to collapse."""
    folder.mkdir(parents=True, exist_ok=True)
    for m in range(motions):
        values = invented_record(m, samples + 40 * (m % 5))
        (folder / f"quay-{m:03}.csv").write_text("\n".join(f"{value:.6f}" for value in values) + "\n")
    for name, count in (("tall", stories), ("low", max(1, stories // 2))):
        (folder / f"{name}.toml").write_text(
            f"""title = "Invented {name}"
[units]
force = "kN"
length = "m"
[building]
kind = "stick"
damping = {{ kind = "rayleigh", ratio = 0.05, modes = [1, {min(2, count)}] }}
p_delta = true
[[story]]
repeat = {count}
height = 3.2
weight = 1800
spring = {{ law = "bilinear", stiffness = 1.6e5, yield_shear = 900, post_yield_ratio = 0.03 }}
""" if count > 1 else f"""title = "Invented {name}"
[units]
force = "kN"
length = "m"
[building]
kind = "stick"
damping = {{ kind = "modal", ratios = [0.05] }}
[[story]]
height = 3.2
weight = 1800
spring = {{ law = "bilinear", stiffness = 1.6e5, yield_shear = 900, post_yield_ratio = 0.03 }}
""")
    listed = ", ".join(f"{0.4 + 0.35 * f:.2f}" for f in range(factors))
    study = folder / "batch.toml"
    study.write_text(
        f"""title = "Invented batch"
buildings = ["tall.toml", "low.toml"]
[units]
force = "kN"
length = "m"
[suite]
motions = ["quay-*.csv"]
units = "m/s2"
step = 0.02
factors = [{listed}]
[march]
step = {step}
tail = 2
[keep]
histories = {histories}
{extra}
[[limit]]
quantity = "drift_ratio"
statistic = "median"
value = 0.02
source = "invented brief"
""")
    return study


def run(study, output, *options, check=None, prefix=(), **more):
    done = subprocess.run([*prefix, PROGRAM, "run", str(study), "-o", str(output), "-q", *options],
                          capture_output=True, text=True, timeout=600, **more)
    if check is not None:
        assert done.returncode == check, f"exit status {done.returncode}, not {check}\n{done.stdout}\n{done.stderr}"
    else:
        assert done.returncode in (0, 1), f"exit status {done.returncode}\n{done.stdout}\n{done.stderr}"
    return done


def arrays_of(file):
    """Everything in a result file but wall times and dates: {name: bytes or texts}."""
    found = {}

    def take(name, item):
        if isinstance(item, h5py.Dataset) and not name.endswith("wall_time"):
            values = item[()]
            found[name] = values.tolist() if values.dtype.kind == "O" else values.tobytes()

    with h5py.File(file, "r") as h5:
        h5.visititems(take)
        found["attributes"] = {k: str(v) for k, v in h5.attrs.items() if k not in ("created", "study_file")}
    return found


def same(a, b):
    x, y = arrays_of(a), arrays_of(b)
    assert x.keys() == y.keys(), x.keys() ^ y.keys()
    for name in x:
        assert x[name] == y[name], f"{name} differs between {a} and {b}"


def long_study(folder, **more):
    """Long enough that its shards are kept on disk."""
    return write_study(folder, **{**dict(motions=24, factors=12, stories=12, samples=1500, step="0.0025"), **more})


def threads(folder):
    for histories in ("[]", '["drift", "base_shear"]'):
        study = write_study(folder / "study", histories=histories, extra="every = 4")
        run(study, folder / "one.h5", "--threads", "1")
        for count in (2, 5):
            run(study, folder / "more.h5", "--threads", str(count))
            same(folder / "one.h5", folder / "more.h5")


def saved_shards(folder):
    study = long_study(folder / "study", motions=16, histories='["story_shear"]', extra='every = 20\nprecision = "single"')
    run(study, folder / "one.h5", "--threads", "1")
    run(study, folder / "two.h5", "--threads", "2")
    same(folder / "one.h5", folder / "two.h5")
    assert not (folder / "two.h5.shards").exists(), "the shards of a finished batch are still there"


def mpirun(ranks):
    return ["mpirun", "--allow-run-as-root", "--oversubscribe", "--bind-to", "none", "-n", str(ranks)]


def ranks(folder):
    study = write_study(folder / "study", histories='["drift"]', extra="every = 10")
    run(study, folder / "alone.h5", "--threads", "1")
    for count in (2, 4):
        run(study, folder / "ranks.h5", "--threads", "1", prefix=mpirun(count))
        same(folder / "alone.h5", folder / "ranks.h5")
    run(study, folder / "ranks.h5", "--threads", "2", prefix=mpirun(3))
    same(folder / "alone.h5", folder / "ranks.h5")


def rank_dies(folder):
    """One rank is killed; mpirun ends the others. What was whole stays, and a restart finishes."""
    study = long_study(folder / "study")
    job = subprocess.Popen([*mpirun(3), PROGRAM, "run", str(study), "-o", str(folder / "ranks.h5"), "-q", "-t", "1"],
                           stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)
    shards = folder / "ranks.h5.shards"
    wait_until(lambda: len(list(shards.glob("shard-*.h5"))) >= 2)
    children = subprocess.run(["pgrep", "-P", str(job.pid)], capture_output=True, text=True).stdout.split()
    os.kill(int(random.Random(5).choice(children)), signal.SIGKILL)
    job.wait(timeout=120)
    assert job.returncode != 0 and not (folder / "ranks.h5").exists()
    kept = len(list(shards.glob("shard-*.h5")))
    assert kept >= 2, kept
    log = folder / "log"
    run(study, folder / "ranks.h5", "-t", "1", "--log", str(log), prefix=mpirun(2))
    lines = [json.loads(line) for line in log.read_text().splitlines()]
    run(study, folder / "alone.h5", "-t", "2", "--log", str(folder / "all"))
    same(folder / "alone.h5", folder / "ranks.h5")
    assert len(lines) == len((folder / "all").read_text().splitlines()) - kept, "a whole shard was marched again"


def wait_until(true, seconds=120):
    end = time.monotonic() + seconds
    while not true():
        assert time.monotonic() < end, "nothing happened"
        time.sleep(0.01)


def kills(folder):
    """kill -9 at 50 random moments of a batch."""
    study = long_study(folder / "study", motions=30)
    run(study, folder / "unbroken.h5", "-t", "2", "--log", str(folder / "all"))
    all_shards = len((folder / "all").read_text().splitlines())
    draw, log, output = random.Random(20261201), folder / "log", folder / "broken.h5"
    killed, marched_again = 0, []
    while killed < 50:
        output.unlink(missing_ok=True)
        before = {file.name for file in folder.glob("broken.h5.shards/shard-*.h5")}
        log.write_text("")
        started = subprocess.Popen([PROGRAM, "run", str(study), "-o", str(output), "-q", "-t", "2", "--log", str(log)],
                                   stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)
        time.sleep(draw.uniform(0.02, 1.2))
        started.send_signal(signal.SIGKILL)
        if started.wait() == -signal.SIGKILL:
            killed += 1
        marched = [json.loads(line)["shard"] for line in log.read_text().splitlines()]
        marched_again += [n for n in marched if f"shard-{n:06}.h5" in before]
        assert not output.exists() or arrays_of(output), "the result file is not whole"
        if output.exists():  # it got through: once more from the start
            same(folder / "unbroken.h5", output)
    assert not marched_again, f"whole shards were marched again: {marched_again}"
    output.unlink(missing_ok=True)
    run(study, output, "-t", "2")
    same(folder / "unbroken.h5", output)
    print(f"50 kills in {all_shards} shards")


def stop_politely(folder):
    study = long_study(folder / "study")
    for number in (signal.SIGINT, signal.SIGTERM):
        output = folder / f"stopped-{number}.h5"
        started = subprocess.Popen([PROGRAM, "run", str(study), "-o", str(output), "-t", "2"], stdout=subprocess.DEVNULL,
                                   stderr=subprocess.PIPE, text=True)
        wait_until(lambda: list(folder.glob(f"{output.name}.shards/shard-*.h5")))
        started.send_signal(number)
        message = started.communicate(timeout=60)[1]
        assert started.returncode == NOT_COMPLETED, started.returncode
        assert "are whole and kept in" in message and "start the same command again" in message, message
        assert not output.exists()
        run(study, output, "-t", "2")
    same(folder / f"stopped-{signal.SIGINT}.h5", folder / f"stopped-{signal.SIGTERM}.h5")


def stopped_shards(study, output):
    """Starts a batch and kills it when some shards are whole."""
    started = subprocess.Popen([PROGRAM, "run", str(study), "-o", str(output), "-q", "-t", "2"])
    wait_until(lambda: list(output.parent.glob(f"{output.name}.shards/shard-*.h5")))
    started.send_signal(signal.SIGKILL)
    started.wait()


def changed_study(folder):
    study, output = long_study(folder / "study"), folder / "result.h5"
    stopped_shards(study, output)
    text = study.read_text()
    study.write_text(text.replace("tail = 2", "tail = 3"))
    done = run(study, output, check=WRONG_INPUT)
    assert "result.h5.shards" in done.stderr and "study" in done.stderr, done.stderr
    study.write_text(text)
    run(study, output)


def damaged_shard(folder):
    study, output = long_study(folder / "study"), folder / "result.h5"
    stopped_shards(study, output)
    victim = sorted(folder.glob("result.h5.shards/shard-*.h5"))[0]
    victim.write_bytes(victim.read_bytes()[:-100])
    done = subprocess.run([PROGRAM, "run", str(study), "-o", str(output)], capture_output=True, text=True, timeout=600)
    assert done.returncode in (0, 1) and "marched again" in done.stderr, done.stderr
    run(study, folder / "other.h5")
    same(output, folder / "other.h5")


def vanished_record(folder):
    study, output = long_study(folder / "study"), folder / "result.h5"
    stopped_shards(study, output)
    kept = len(list(folder.glob("result.h5.shards/shard-*.h5")))
    (folder / "study" / "quay-003.csv").rename(folder / "elsewhere.csv")
    done = run(study, output, check=WRONG_INPUT)  # fewer records match: a changed study
    assert "result.h5.shards" in done.stderr, done.stderr
    assert len(list(folder.glob("result.h5.shards/shard-*.h5"))) >= kept
    (folder / "elsewhere.csv").rename(folder / "study" / "quay-003.csv")
    run(study, output)


def full_disk(folder):
    """The shards do not fit into a small file system: what fits stays, and with room the batch goes on."""
    small = folder / "small"
    small.mkdir()
    if subprocess.run(["mount", "-t", "tmpfs", "-o", "size=1m", "tmpfs", str(small)], capture_output=True).returncode:
        print("SKIPPED: mounting is not permitted here")
        sys.exit(77)
    try:
        study = long_study(folder / "study", histories='["story_shear"]', extra="every = 10")
        done = run(study, small / "result.h5", check=OUTSIDE_FAILED)
        assert "No space left on device" in done.stderr and "start the same command again" in done.stderr, done.stderr
        assert not (small / "result.h5").exists()
        kept = sorted((small / "result.h5.shards").glob("shard-*.h5"))
        assert kept and not list((small / "result.h5.shards").glob("*partial*")), os.listdir(small / "result.h5.shards")
        subprocess.run(["mount", "-o", "remount,size=200m", str(small)], check=True)
        run(study, small / "result.h5")
        run(study, folder / "other.h5")
        same(small / "result.h5", folder / "other.h5")
    finally:
        subprocess.run(["umount", str(small)])


def result_in_use(folder):
    """A reader of HDF5 holds a lock on the file it reads."""
    study, output = write_study(folder / "study"), folder / "result.h5"
    run(study, output)
    before = output.read_bytes()
    with h5py.File(output, "r", locking=True):
        done = run(study, output, check=OUTSIDE_FAILED)
    assert "result.h5" in done.stderr and "open" in done.stderr, done.stderr
    assert output.read_bytes() == before
    run(study, output)


def dry(folder):
    study = long_study(folder / "study")
    done = subprocess.run([PROGRAM, "run", str(study), "-o", str(folder / "result.h5"), "--dry"], capture_output=True,
                          text=True, timeout=60)
    assert done.returncode == 0, done.stderr
    assert f"runs:          {2 * 24 * 12} (buildings 2 x motions 24 x factors 12)" in done.stdout, done.stdout
    for word in ("shards:", "work:", "time:", "size on disk:"):
        assert word in done.stdout, done.stdout
    assert list(folder.iterdir()) == [folder / "study"], "a dry run left something behind"


def main():
    check = globals()[sys.argv[2]]
    with tempfile.TemporaryDirectory() as folder:
        check(pathlib.Path(folder))


main()
