"""check_format.py CLANG_FORMAT ROOT: every .hpp and .cpp of the tree stands as clang-format would write it."""
import pathlib
import re
import subprocess
import sys

sys.path.insert(0, str(pathlib.Path(__file__).resolve().parent.parent))
from source_tree import source_files  # noqa: E402


def badly_formatted(clang_format, root):
    files = [str(file) for file in source_files(root) if file.suffix in (".hpp", ".cpp")]
    if not files:
        sys.exit(f"no .hpp or .cpp under {root}")
    checked = subprocess.run(
        [clang_format, "--dry-run", "-Werror", "--style=file", *files], cwd=root, capture_output=True, text=True)
    bad = sorted(set(re.findall(r"^(.+?):\d+:\d+: error:", checked.stderr, re.MULTILINE)))
    if checked.returncode != 0 and not bad:
        sys.exit(checked.stderr)
    return bad


def main(clang_format, root):
    bad = badly_formatted(clang_format, root)
    for file in bad:
        print(f"{file}: run {clang_format} -i {file}")
    return 1 if bad else 0


if __name__ == "__main__":
    sys.exit(main(*sys.argv[1:]))
