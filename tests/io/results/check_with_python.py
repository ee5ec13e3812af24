"""Reads a result file with readers that know nothing of this program, and compares.

h5py: every array has units that UDUNITS-2 can parse, a long name of one line and, but for scales, a named dimension
scale on every axis; the values are those in the JSON file beside it. xarray, with the engines h5netcdf and netcdf4:
every group opens as a labelled data set.
"""
import ctypes
import ctypes.util
import json
import sys

import h5netcdf  # noqa: F401  (xarray would only say that the engine is unknown)
import h5py
import netCDF4  # noqa: F401
import numpy as np
import xarray

GROUPS = ["building", "motions", "runs", "peaks", "residual", "histories/0", "verdict"]
SCALES = {"run": 0, "story": 1, "floor": 1, "moved_floor": 1, "mode": 1, "motion": 0, "building": 0, "limit": 0, "outcome": 0, "listed": 0}
failures = []


def expect(holds, message):
    if not holds:
        failures.append(message)


def unit_parser():
    library = ctypes.CDLL(ctypes.util.find_library("udunits2"))
    library.ut_set_error_message_handler(library.ut_ignore)
    library.ut_read_xml.restype = library.ut_parse.restype = ctypes.c_void_p
    library.ut_parse.argtypes = [ctypes.c_void_p, ctypes.c_char_p, ctypes.c_int]
    system = library.ut_read_xml(None)
    return lambda text: bool(library.ut_parse(system, text.encode(), 2))  # 2: UTF-8


def check_array(name, data, is_unit):
    units, long_name = data.attrs.get("units"), data.attrs.get("long_name")
    expect(isinstance(units, str) and is_unit(units), f"{name}: units {units!r}")
    expect(isinstance(long_name, str) and long_name and "\n" not in long_name, f"{name}: long_name {long_name!r}")
    if h5py.h5ds.is_scale(data.id):
        return
    for axis, dimension in enumerate(data.dims):
        expect(len(dimension) == 1, f"{name}: axis {axis} has {len(dimension)} scales")
        for scale in dimension.values():
            expect(scale.shape == (data.shape[axis],), f"{name}: axis {axis} and its scale differ in length")
            expect(scale.parent == data.parent, f"{name}: the scale of axis {axis} is in another group")


def check_values(name, data, expected):
    found = data.asstr()[()].ravel().tolist() if h5py.check_string_dtype(data.dtype) else data[()].ravel()
    if isinstance(found, list):
        expect(found == expected, f"{name}: {found} is not {expected}")
    else:
        wanted = np.array([float(x) for x in expected])
        expect(np.array_equal(found, wanted, equal_nan=True), f"{name}: values differ")


def check_with_h5py(path, expected):
    is_unit = unit_parser()
    expect(not is_unit("no such unit"), "the unit parser takes anything")
    arrays = []
    with h5py.File(path) as file:
        for attribute in ("title", "study_text", "study_file", "program", "program_version", "created",
                          "sign_convention", "study_force_unit", "study_length_unit", "study_mass_unit"):
            expect(isinstance(file.attrs.get(attribute), str), f"root attribute {attribute}")
        expect("β ≤ ¼" in file.attrs["study_text"], "the study text is not the UTF-8 that was written")
        file.visititems(lambda name, item: arrays.append(name) if isinstance(item, h5py.Dataset) else None)
        expect(len(arrays) > 60, f"only {len(arrays)} arrays")
        for name in arrays:
            check_array(name, file[name], is_unit)
        for name, values in expected.items():
            expect(name in file, f"{name} is missing")
            if name in file:
                check_values(name, file[name], values)
        drift = file["/histories/0/drift"]
        expect(drift.chunks and drift.compression == "gzip" and drift.shuffle, "histories are not compressed")


def check_labels(where, dataset):
    expect(len(dataset.data_vars) > 0, f"{where}: no variables")
    for name in dataset.dims:
        expect(name in dataset.coords, f"{where}: {name} has no coordinate")
        if name in SCALES and name in dataset.coords:
            labels = np.arange(dataset.sizes[name]) + SCALES[name]
            expect(np.array_equal(dataset[name], labels), f"{where}: labels of {name}")


def check_with_xarray(path, expected):
    for engine in ("h5netcdf", "netcdf4"):
        for group in GROUPS:
            with xarray.open_dataset(path, group=group, engine=engine) as dataset:
                check_labels(f"{engine} {group}", dataset)
                for name, values in expected.items():
                    if name.startswith(f"/{group}/") and isinstance(values[0], (int, float)):
                        found = dataset[name.split("/")[-1]].values.ravel()
                        wanted = np.array([float(x) for x in values])
                        expect(np.array_equal(found, wanted, equal_nan=True), f"{engine} {name}: values differ")
        with xarray.open_dataset(path, group="peaks", engine=engine) as peaks:
            expect(peaks["drift_ratio"].dims == ("run", "story"), f"{engine}: drift_ratio is {peaks['drift_ratio'].dims}")
            # Run 1 is motion 1 at factor 0.5; by the formula of the invented results, story 3 drifts -0.5 * 0.007.
            drift = float(peaks["drift_ratio"].sel(run=1, story=3))
            expect(abs(drift + 0.0035) < 1e-15, f"{engine}: drift ratio of run 1, story 3 is {drift}")
        with xarray.open_dataset(path, group="building", engine=engine) as building:
            expect(building["K"].dims == ("building", "floor", "moved_floor"), f"{engine}: K is {building['K'].dims}")
            expect(building["period"].dims == ("building", "mode"), f"{engine}: period is {building['period'].dims}")
            expect(building["label"].dims == ("building", "story"), f"{engine}: label is {building['label'].dims}")
            low = building.sel(building=1)
            expect(int(low["stories"]) == 5 and int(low["height"].count()) == 5, f"{engine}: the second has not 5 stories")
        with xarray.open_dataset(path, group="histories/0", engine=engine) as history:
            expect(history["drift"].dims == ("time", "story"), f"{engine}: history of drift is {history['drift'].dims}")
            expect(history["time"].attrs["units"] == "s", f"{engine}: time is in {history['time'].attrs}")


def main():
    path, expected_path = sys.argv[1:]
    with open(expected_path) as file:
        expected = json.load(file)
    check_with_h5py(path, expected)
    check_with_xarray(path, expected)
    for failure in failures:
        print("FAILED:", failure)
    print(f"{len(expected)} arrays compared, {len(failures)} failures")
    return 1 if failures else 0


sys.exit(main())
