"""That check_layering.py finds what it is there for: every breach in an invented bad tree, none in a good one."""
import pathlib
import sys
import tempfile
import unittest

sys.dont_write_bytecode = True
from check_layering import MAY_USE, all_breaches  # noqa: E402

GOOD = {
    "CMakeLists.txt": "",
    "README.md": "",
    ".clang-format": "",
    "core/a.hpp": "#include <vector>\n",
    "integrators/b.hpp": '#include "core/a.hpp"\n',
    "io/c.hpp": '#include "core/a.hpp"\n',
    "apps/d.cpp": '#include "core/a.hpp"\n#include "integrators/b.hpp"\n#include "io/c.hpp"\n',
    "tests/io/e.cpp": '#include <gtest/gtest.h>\n#include "io/c.hpp"\n',
}
GOOD_LINKS = [
    "pilotis_core\t{root}/core\tEigen3::Eigen;$<BUILD_INTERFACE:pilotis_options>\ta.cpp",
    "pilotis_integrators\t{root}/integrators\tpilotis::core\tb.cpp",
    "pilotis_io\t{root}/io\tpilotis::core;fmt::fmt\tc.cpp;{root}/core/a.hpp",
    "pilotis\t{root}/apps\tpilotis::core;pilotis::integrators;pilotis::io\td.cpp",
    "pilotis_options\t{root}\t\t",
]


class Layering(unittest.TestCase):
    def breaches(self, changed=None, links=GOOD_LINKS):
        with tempfile.TemporaryDirectory() as folder:
            root = pathlib.Path(folder).resolve()
            for name, text in {**GOOD, **(changed or {})}.items():
                (root / name).parent.mkdir(parents=True, exist_ok=True)
                (root / name).write_text(text)
            return all_breaches(root, [line.format(root=root) for line in links])

    def expect_one(self, words, changed=None, links=GOOD_LINKS):
        found = self.breaches(changed, links)
        self.assertEqual(len(found), 1, found)
        for word in words:
            self.assertIn(word, found[0])

    def test_a_good_tree_has_no_breach(self):
        self.assertEqual(self.breaches(), [])

    def test_every_include_across_a_wall_is_found(self):
        headers = {"core": "core/a.hpp", "integrators": "integrators/b.hpp", "io": "io/c.hpp", "apps": "apps/d.hpp"}
        forbidden = [("core", "integrators"), ("core", "io"), ("core", "apps"), ("integrators", "io"),
                     ("integrators", "apps"), ("io", "integrators"), ("io", "apps")]
        for room, other in forbidden:
            self.assertNotIn(other, MAY_USE[room])
            bad = {"apps/d.hpp": "", f"{room}/deep/bad.cpp": f'\n  #  include "{headers[other]}"\n'}
            self.expect_one([f"{room}/deep/bad.cpp:2", f"{room} must not include {other}"], bad)

    def test_an_include_not_from_the_root_is_found(self):
        self.expect_one(["core/bad.hpp:1", "from the root"], {"core/bad.hpp": '#include "a.hpp"\n'})
        self.expect_one(["io/bad.hpp:1", "from the root"], {"io/bad.hpp": '#include "../core/a.hpp"\n'})
        self.expect_one(["io/bad.hpp:1", "quotation marks"], {"io/bad.hpp": "#include <core/a.hpp>\n"})
        self.expect_one(["io/bad.hpp:1", "no such file"], {"io/bad.hpp": '#include "core/gone.hpp"\n'})

    def test_anything_more_at_the_top_level_is_found(self):
        self.expect_one(["scripts", "top level"], {"scripts/run.sh": ""})
        self.expect_one(["NOTES.md", "top level"], {"NOTES.md": ""})

    def test_a_link_across_a_wall_is_found(self):
        for link in ("pilotis::io", "pilotis_io", "$<BUILD_INTERFACE:pilotis_io>", "$<LINK_ONLY:pilotis::io>"):
            bad = [line.replace("pilotis::core\tb.cpp", f"pilotis::core;{link}\tb.cpp") for line in GOOD_LINKS]
            self.expect_one(["pilotis_integrators", "of io"], links=bad)

    def test_a_source_of_another_room_is_found(self):
        bad = [line.replace("\ta.cpp", "\ta.cpp;../io/c.cpp") for line in GOOD_LINKS]
        self.expect_one(["pilotis_core", "../io/c.cpp of io"], links=bad)


if __name__ == "__main__":
    unittest.main()
