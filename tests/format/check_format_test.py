"""That check_format.py tells a well formatted file from a badly formatted one."""
import pathlib
import shutil
import sys
import tempfile
import unittest

sys.dont_write_bytecode = True
from check_format import badly_formatted  # noqa: E402

CLANG_FORMAT, ROOT = sys.argv.pop(1), sys.argv.pop(1)


class Format(unittest.TestCase):
    def test_only_the_bad_file_is_named(self):
        with tempfile.TemporaryDirectory() as folder:
            shutil.copy(pathlib.Path(ROOT, ".clang-format"), folder)
            pathlib.Path(folder, "good.cpp").write_text("int one() { return 1; }\n")
            pathlib.Path(folder, "bad.hpp").write_text("int   two( ){return 2 ;}\n")
            self.assertEqual(badly_formatted(CLANG_FORMAT, folder), ["bad.hpp"])


if __name__ == "__main__":
    unittest.main()
