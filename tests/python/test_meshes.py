"""The meshes that `prove` writes, read and measured by two other libraries: trimesh and manifold3d."""

import json
import os
import subprocess
from pathlib import Path

import manifold3d
import numpy as np
import pytest
import trimesh

EXAMPLES = sorted((Path(__file__).parents[2] / "examples").glob("*.toml"))
STRICKLE = os.environ["STRICKLE"]

# All of them add up the same triangles in double precision; a sum of 1e5 terms keeps this much.
AGREE = 1e-10
MM = 1e-3


@pytest.fixture(params=EXAMPLES, ids=lambda path: path.stem)
def proof(request, tmp_path):
    done = subprocess.run(
        [STRICKLE, "prove", str(request.param), "-o", str(tmp_path), "--json"],
        capture_output=True,
        text=True,
        timeout=300,
    )
    assert done.returncode == 0, done.stdout + done.stderr
    (file,) = tmp_path.glob("*.stl")
    return json.loads(done.stdout), trimesh.load(file, file_type="stl")


def test_trimesh_measures_the_same(proof):
    record, mesh = proof
    assert len(mesh.faces) == record["mesh"]["triangles"]
    assert mesh.is_watertight
    assert mesh.is_winding_consistent
    measured = record["measured"]
    assert mesh.volume * MM**3 == pytest.approx(measured["volume"], rel=AGREE)
    assert mesh.area * MM**2 == pytest.approx(measured["surface"], rel=AGREE)
    extent = max(map(abs, record["exact"]["bounds"]["min"] + record["exact"]["bounds"]["max"]))
    if len(record["exact"]["bodies"]) == 1:
        # Of one density, so that the centre of the volume is that of the mass.
        np.testing.assert_allclose(mesh.center_mass * MM, measured["centre"], rtol=0, atol=AGREE * extent)
        mesh.density = record["exact"]["density"]
        np.testing.assert_allclose(
            mesh.moment_inertia * MM**5,
            measured["inertia_about_centre"],
            rtol=0,
            atol=AGREE * record["exact"]["mass"] * extent**2,
        )


def test_manifold3d_finds_a_solid_of_the_same_volume(proof):
    record, mesh = proof
    solid = manifold3d.Manifold(
        manifold3d.Mesh64(
            vert_properties=np.asarray(mesh.vertices, dtype=np.float64),
            tri_verts=np.asarray(mesh.faces, dtype=np.uint64),
        )
    )
    assert solid.status() == manifold3d.Error.NoError
    assert solid.volume() * MM**3 == pytest.approx(record["measured"]["volume"], rel=AGREE)
