"""Which files belong to a source tree: those git knows (or would add); without git, all but dot files and build folders."""
import pathlib
import subprocess


def source_files(root):
    """Paths relative to `root`, sorted."""
    root = pathlib.Path(root).resolve()
    listed = _listed_by_git(root)
    return sorted(_walked(root) if listed is None else listed)


def _git(root, *words):
    try:
        done = subprocess.run(["git", "-C", str(root), *words], capture_output=True, text=True)
    except FileNotFoundError:
        return None
    return done.stdout if done.returncode == 0 else None


def _listed_by_git(root):
    top = _git(root, "rev-parse", "--show-toplevel")
    if top is None or pathlib.Path(top.strip()).resolve() != root:
        return None
    names = _git(root, "ls-files", "-z", "--cached", "--others", "--exclude-standard")
    return [pathlib.Path(name) for name in names.split("\0") if name and (root / name).exists()]


def _walked(root, folder=pathlib.Path()):
    for entry in (root / folder).iterdir():
        path = folder / entry.name
        is_build = (entry / "CMakeCache.txt").exists()
        if entry.name.startswith(".") or entry.name == "__pycache__" or is_build:
            continue
        if entry.is_dir():
            yield from _walked(root, path)
        else:
            yield path
