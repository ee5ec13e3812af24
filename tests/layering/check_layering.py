"""Keeps the walls of the house: core <- integrators, core <- io, everything <- apps; integrators and io never meet.

    check_layering.py ROOT [LINKS]

LINKS is the list CMake writes of what every target of ours links and is made of, one line each:
    target <TAB> folder it is declared in <TAB> its link libraries <TAB> its sources
Prints every breach and ends with status 1 if there is one.
"""
import pathlib
import re
import sys

sys.path.insert(0, str(pathlib.Path(__file__).resolve().parent.parent))
from source_tree import source_files  # noqa: E402

MAY_USE = {
    "core": {"core"},
    "integrators": {"core", "integrators"},
    "io": {"core", "io"},
    "apps": {"core", "integrators", "io", "apps"},
    "tests": {"core", "integrators", "io", "apps", "tests"},
}
TOP_LEVEL = {"CMakeLists.txt", "README.md", "DEVELOPERS.md", "LICENSE", "data-demo", *MAY_USE}
INCLUDE = re.compile(r'^\s*#\s*include\s*(["<])([^">]+)[">]')


def top_level_breaches(files):
    found = {file.parts[0] for file in files}
    return [
        f"{name}: not on the list of what stands at the top level"
        for name in sorted(found - TOP_LEVEL)
        if not name.startswith(".")
    ]


def include_breach(root, room, mark, name):
    """What is wrong with one include of a file in `room`; empty if nothing."""
    other = name.split("/")[0]
    if other not in MAY_USE or "/" not in name:
        return "an include of ours is written from the root" if mark == '"' else ""
    if mark == "<":
        return "an include of ours stands in quotation marks"
    if not (root / name).is_file():
        return "there is no such file"
    return "" if other in MAY_USE[room] else f"{room} must not include {other}"


def include_breaches(root, files):
    breaches = []
    for file in files:
        room = file.parts[0]
        if room not in MAY_USE or file.suffix not in (".hpp", ".cpp"):
            continue
        if room == "tests" and file.parts[1:2] == ("package",):
            continue  # a program outside the house: it includes what is installed
        for number, line in enumerate((root / file).read_text().splitlines(), 1):
            include = INCLUDE.match(line)
            problem = include and include_breach(root, room, *include.groups())
            if problem:
                breaches.append(f"{file}:{number}: {include.group(2)}: {problem}")
    return breaches


def room_of(root, path):
    """The room a folder or file stands in; None when it is outside all of them."""
    path = pathlib.Path(path)
    if not path.is_relative_to(root):
        return None
    first = path.relative_to(root).parts[:1]
    return first[0] if first and first[0] in MAY_USE else None


def link_breaches(root, lines):
    targets = [line.split("\t") for line in lines if line.strip()]
    rooms = {name: room_of(root, folder) for name, folder, _, _ in targets}
    rooms.update({name.replace("pilotis_", "pilotis::", 1): room for name, room in rooms.items()})
    breaches = []
    for name, folder, libraries, sources in targets:
        room = rooms[name]
        if room is None:
            continue
        plain = re.sub(r"\$<(BUILD_INTERFACE|LINK_ONLY):", " ", libraries)
        for word in sorted(set(re.findall(r"[\w:.+-]+", plain))):
            other = rooms.get(word)
            if other and other not in MAY_USE[room]:
                breaches.append(f"target {name} of {room} links {word} of {other}")
        for source in filter(None, sources.split(";")):
            other = room_of(root, pathlib.Path(folder, source).resolve())
            if other and other not in MAY_USE[room]:
                breaches.append(f"target {name} of {room} compiles {source} of {other}")
    return breaches


def all_breaches(root, link_lines=()):
    root = pathlib.Path(root).resolve()
    files = source_files(root)
    return top_level_breaches(files) + include_breaches(root, files) + link_breaches(root, link_lines)


def main(arguments):
    links = pathlib.Path(arguments[1]).read_text().splitlines() if len(arguments) > 1 else []
    breaches = all_breaches(arguments[0], links)
    print("\n".join(breaches) if breaches else f"no breach; {len(links)} targets looked at")
    return 1 if breaches else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
