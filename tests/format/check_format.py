"""check_format.py CLANG_FORMAT ROOT: every .hpp and .cpp of the tree stands as clang-format would write it."""
import pathlib
import subprocess
import sys

sys.path.insert(0, str(pathlib.Path(__file__).resolve().parent.parent))
from source_tree import source_files  # noqa: E402


def badly_formatted(clang_format, root):
    files = [str(file) for file in source_files(root) if file.suffix in (".hpp", ".cpp")]
    if not files:
        sys.exit(f"no .hpp or .cpp under {root}")
    command = [clang_format, "--dry-run", "-Werror", "--style=file"]
    return [file for file in files if subprocess.run([*command, file], cwd=root, capture_output=True).returncode != 0]


def main(clang_format, root):
    bad = badly_formatted(clang_format, root)
    for file in bad:
        print(f"{file}: run {clang_format} -i {file}")
    return 1 if bad else 0


if __name__ == "__main__":
    sys.exit(main(*sys.argv[1:]))
