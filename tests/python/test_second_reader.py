"""The examples' exact figures against a second reading of the same files by other means."""

import json
import os
import subprocess
import tomllib
from pathlib import Path

import numpy as np
import pytest

import second_reader

TOP = Path(__file__).parents[2]
EXAMPLES = sorted((TOP / "examples").glob("*.toml"))
STRICKLE = os.environ["STRICKLE"]

# Corners are found by Newton's method to about 1e-14 of a part, and every figure feels them several times over.
AGREE = 1e-11


@pytest.fixture(scope="module")
def density_of():
    table = tomllib.loads((TOP / "assets/materials.toml").read_text(encoding="utf-8"))
    densities = {material["name"]: material["density"] for material in table["material"]}
    return densities.__getitem__


def weighed(path):
    done = subprocess.run(
        [STRICKLE, "weigh", "--json", str(path)], capture_output=True, text=True, timeout=60
    )
    assert done.returncode == 0, done.stderr
    return json.loads(done.stdout)["exact"]


@pytest.mark.parametrize("path", EXAMPLES, ids=lambda path: path.stem)
def test_both_readings_agree(path, density_of):
    exact = weighed(path)
    second = second_reader.figures(path, density_of)
    section = exact["section"]
    for found, wanted in [
        (exact["volume"], second["volume"]),
        (exact["surface"], second["surface"]),
        (exact["mass"], second["mass"]),
        (section["area"], second["area"]),
        (section["perimeter"], second["perimeter"]),
    ]:
        assert found == pytest.approx(wanted, rel=AGREE, abs=0)
    extent = max(map(abs, exact["bounds"]["min"] + exact["bounds"]["max"]))
    np.testing.assert_allclose(exact["centre"], second["centre"], rtol=0, atol=AGREE * extent)
    np.testing.assert_allclose(
        exact["inertia_about_origin"],
        second["inertia_about_origin"],
        rtol=0,
        atol=AGREE * exact["mass"] * extent**2,
    )


def test_the_second_reading_knows_a_torus(tmp_path):
    path = tmp_path / "torus.toml"
    path.write_text(
        'format = 1\n[part]\nname = "torus"\nunit = "cm"\n[[body]]\nname = "ring"\ndensity = "2000 kg/m3"\n'
        "outline = { circle = { r = 50, z = 10 }, radius = 12 }\n",
        encoding="utf-8",
    )
    second = second_reader.figures(path, {}.__getitem__)
    volume = 2 * np.pi**2 * 0.5 * 0.12**2
    assert second["volume"] == pytest.approx(volume, rel=1e-13)
    assert second["surface"] == pytest.approx(4 * np.pi**2 * 0.5 * 0.12, rel=1e-13)
    axial = 2000 * volume * (0.5**2 + 0.75 * 0.12**2)
    across = 2000 * volume * (0.5**2 / 2 + 0.625 * 0.12**2 + 0.1**2)
    np.testing.assert_allclose(
        second["inertia_about_origin"], np.diag([across, across, axial]), rtol=1e-12, atol=1e-12 * axial
    )
