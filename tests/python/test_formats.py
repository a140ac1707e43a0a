"""What `mesh` writes: read by trimesh, numpy-stl and manifold3d, and against the core rules of 3MF."""

import json
import os
import subprocess
import xml.etree.ElementTree as ET
import zipfile
from collections import Counter
from pathlib import Path

import manifold3d
import numpy as np
import pytest
import trimesh
from stl import mesh as numpy_stl

EXAMPLES = Path(__file__).parents[2] / "examples"
STRICKLE = os.environ["STRICKLE"]
# A curved wall, two bodies, a part turn, a body that reaches the axis.
PARTS = ["fog_bell", "winch_flywheel", "quarter_segment", "mooring_float"]
MM = 1e-3
# A coordinate in f32 is off by half a unit of its last place, 2^-25 of itself; a thin wall's volume by a few thousand times that.
SINGLE = 1e-5
DOUBLE = 1e-9
# 3MF Core Specification 1.3, section 2.1 and appendix.
CORE = "{http://schemas.microsoft.com/3dmanufacturing/core/2015/02}"
MODEL = "http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel"


def run(*words, status=0):
    done = subprocess.run([STRICKLE, *map(str, words)], capture_output=True, text=True, timeout=300)
    assert done.returncode == status, done.stdout + done.stderr
    return done


def written(part, folder, name, *words):
    """The file and the machine output of writing it."""
    file = folder / name
    done = run("mesh", EXAMPLES / f"{part}.toml", "-o", file, "--json", *words)
    return file, json.loads(done.stdout)


@pytest.fixture(params=PARTS)
def part(request):
    return request.param


@pytest.mark.parametrize(
    ("name", "words", "allowed"),
    [("a.stl", [], SINGLE), ("a.stl", ["--text"], SINGLE), ("a.obj", [], DOUBLE), ("a.3mf", [], DOUBLE)],
    ids=["stl", "stl text", "obj", "3mf"],
)
def test_each_format_is_the_part(part, name, words, allowed, tmp_path):
    file, record = written(part, tmp_path, name, *words)
    exact = record["exact"]
    # Without being told so trimesh makes one mesh of all objects of an OBJ.
    read = trimesh.load(file, process=True, **({"split_objects": True} if name == "a.obj" else {}))
    bodies = list(read.geometry.values()) if isinstance(read, trimesh.Scene) else [read]
    if name != "a.stl":
        assert len(bodies) == len(exact["bodies"])
    else:
        bodies = list(bodies[0].split(only_watertight=True))
    assert sum(len(body.faces) for body in bodies) == record["mesh"]["triangles"]
    for body in bodies:
        assert body.is_watertight
        assert body.is_winding_consistent
        solid = manifold3d.Manifold(
            manifold3d.Mesh64(np.asarray(body.vertices, np.float64), np.asarray(body.faces, np.uint64))
        )
        assert solid.status() == manifold3d.Error.NoError
    volume = sum(body.volume for body in bodies) * MM**3
    assert volume == pytest.approx(exact["volume"], rel=allowed)
    if len(exact["bodies"]) == 1 and len(bodies) == 1:
        extent = max(map(abs, exact["bounds"]["min"] + exact["bounds"]["max"]))
        np.testing.assert_allclose(bodies[0].center_mass * MM, exact["centre"], rtol=0, atol=2e-3 * extent)


@pytest.mark.parametrize("words", [[], ["--text"]], ids=["bytes", "text"])
def test_numpy_stl_reads_the_same_facets(part, words, tmp_path):
    file, record = written(part, tmp_path, "a.stl", *words)
    read = numpy_stl.Mesh.from_file(str(file))
    assert len(read.vectors) == record["mesh"]["triangles"]
    corners = np.asarray(read.vectors, np.float64)
    volume = np.einsum("ij,ij->i", corners[:, 0], np.cross(corners[:, 1], corners[:, 2])).sum() / 6 * MM**3
    assert volume == pytest.approx(record["exact"]["volume"], rel=SINGLE)


def test_3mf_keeps_the_core_rules(part, tmp_path):
    file, record = written(part, tmp_path, "a.3mf", "--unit", "in")
    with zipfile.ZipFile(file) as package:
        assert package.testzip() is None
        assert {entry.date_time for entry in package.infolist()} == {(1980, 1, 1, 0, 0, 0)}
        types = ET.fromstring(package.read("[Content_Types].xml"))
        assert {kind.get("Extension") for kind in types} == {"rels", "model"}
        (relation,) = ET.fromstring(package.read("_rels/.rels"))
        assert relation.get("Type") == MODEL
        model = ET.fromstring(package.read(relation.get("Target").lstrip("/")))
    assert model.tag == f"{CORE}model"
    assert model.get("unit") == "inch"
    resources = model.find(f"{CORE}resources")
    names = [base.get("name") for base in resources.iter(f"{CORE}base")]
    objects = resources.findall(f"{CORE}object")
    ids = [thing.get("id") for thing in resources]
    assert len(set(ids)) == len(ids)
    assert [item.get("objectid") for item in model.iter(f"{CORE}item")] == [thing.get("id") for thing in objects]
    for thing, body in zip(objects, record["exact"]["bodies"], strict=True):
        assert thing.get("name") == body["name"]
        assert thing.get("pid") in ids
        if body["material"] is not None:
            assert names[int(thing.get("pindex"))] == body["material"]
        corners = np.array([[float(v.get(axis)) for axis in "xyz"] for v in thing.iter(f"{CORE}vertex")]) * 0.0254
        triangles = np.array([[int(t.get(v)) for v in ("v1", "v2", "v3")] for t in thing.iter(f"{CORE}triangle")])
        assert triangles.min() >= 0
        assert triangles.max() < len(corners)
        edges = Counter(edge for a, b, c in triangles.tolist() for edge in ((a, b), (b, c), (c, a)))
        # Section 4.1: closed, and each edge in both directions.
        assert set(edges.values()) == {1}
        assert all((b, a) in edges for a, b in edges)
        p, q, r = (corners[triangles[:, i]] for i in range(3))
        volume = np.einsum("ij,ij->i", p, np.cross(q, r)).sum() / 6
        assert volume == pytest.approx(body["volume"], rel=DOUBLE)


@pytest.mark.parametrize("name", ["a.stl", "a.obj", "a.3mf"])
def test_the_same_bytes_each_time(part, name, tmp_path):
    first, _ = written(part, tmp_path, name)
    before = first.read_bytes()
    again, _ = written(part, tmp_path, name)
    assert before == again.read_bytes()


def test_placements_lie_on_their_sides(part, tmp_path):
    volumes = []
    for placement in ("inscribed", "volume-true", "circumscribed"):
        _, record = written(part, tmp_path, "a.obj", "--placement", placement)
        assert record["mesh"]["placement"] == placement
        volumes.append(record["mesh"]["predicted"]["volume"] / record["exact"]["volume"])
    assert volumes[0] < 1 < volumes[2]
    assert volumes[1] == pytest.approx(1, abs=DOUBLE)


TORUS = """format = 1
[part]
name = "invented ring"
unit = "m"
[[body]]
name = "ring"
density = "1000 kg/m3"
outline = { circle = { r = 3, z = 0 }, radius = 1 }
"""


def distances(points, triangles):
    """From each point to the nearest triangle: to its plane inside, else to its edges (Ericson 2005, section 5.1.5)."""
    a, b, c = (triangles[:, i] for i in range(3))
    normal = np.cross(b - a, c - a)
    normal /= np.linalg.norm(normal, axis=1, keepdims=True)
    found = []
    for p in points:
        inside = np.ones(len(a), bool)
        best = np.full(len(a), np.inf)
        for s, t in ((a, b), (b, c), (c, a)):
            along = t - s
            inside &= np.einsum("ij,ij->i", np.cross(along, p - s), normal) >= 0
            share = np.clip(np.einsum("ij,ij->i", p - s, along) / np.einsum("ij,ij->i", along, along), 0, 1)
            best = np.minimum(best, np.linalg.norm(p - s - share[:, None] * along, axis=1))
        height = np.abs(np.einsum("ij,ij->i", p - a, normal))
        found.append(np.where(inside, height, best).min())
    return np.array(found)


def test_a_torus_is_near_both_ways_and_the_bound_is_not_idle(tmp_path):
    source, file = tmp_path / "ring.toml", tmp_path / "ring.obj"
    source.write_text(TORUS)
    done = run("mesh", source, "-o", file, "--within", "0.01", "--unit", "m", "--json")
    bound = json.loads(done.stdout)["mesh"]["largest_deviation"]
    assert bound <= 0.01
    read = trimesh.load(file, process=False)
    triangles = np.asarray(read.triangles)
    rng = np.random.default_rng(7)
    # On the mesh: the exact distance to a torus of radii 3 and 1.
    weights = rng.dirichlet([1, 1, 1], size=(len(triangles), 8))
    p = np.einsum("tsk,tkx->tsx", weights, triangles).reshape(-1, 3)
    p = np.vstack([p, read.vertices])
    off = np.abs(np.hypot(np.hypot(p[:, 0], p[:, 1]) - 3, p[:, 2]) - 1)
    assert off.max() <= bound * (1 + 1e-9)
    assert off.max() >= bound / 2
    # On the torus.
    u, v = rng.uniform(0, 2 * np.pi, (2, 400))
    q = np.stack([(3 + np.cos(v)) * np.cos(u), (3 + np.cos(v)) * np.sin(u), np.sin(v)], axis=1)
    assert distances(q, triangles).max() <= bound * (1 + 1e-9)


@pytest.mark.parametrize(
    ("words", "status"),
    [
        (["-o", "a.step"], 2),
        (["-o", "a"], 2),
        (["-o", "a.obj", "--text"], 2),
        (["-o", "missing/a.stl"], 3),
        (["-o", "folder.stl"], 3),
        *[(["-o", "a.stl", "--within", value], 2) for value in ("0", "0mm", "-1", "nan", "5x", "1e-30")],
        (["-o", "a.stl", "--edge", "0"], 2),
        (["-o", "a.stl", "--aspect", "2"], 2),
        (["-o", "a.stl", "--aspect", "nan"], 2),
        (["-o", "a.stl", "--triangles", "3"], 2),
        (["-o", "a.stl", "--triangles", "40"], 2),
        (["-o", "a.stl", "--triangles", "4000", "--within", "1"], 2),
        (["-o", "a.stl", "--segments", "2"], 2),
        (["-o", "a.stl", "--most", "100"], 2),
    ],
    ids=lambda value: " ".join(value[1:]) if isinstance(value, list) else None,
)
def test_what_cannot_be_leaves_everything_as_it_was(words, status, tmp_path):
    (tmp_path / "folder.stl").mkdir()
    (tmp_path / "a.stl").write_text("what was there")
    before = sorted(tmp_path.iterdir())
    done = subprocess.run(
        [STRICKLE, "mesh", str(EXAMPLES / "fog_bell.toml"), *words], cwd=tmp_path, capture_output=True, text=True, timeout=60
    )
    assert done.returncode == status, done.stdout + done.stderr
    assert "error" in done.stderr
    assert sorted(tmp_path.iterdir()) == before
    assert (tmp_path / "a.stl").read_text() == "what was there"


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="the system has no full device")
def test_a_full_disk_is_told():
    done = subprocess.run(
        f"{STRICKLE} prove {EXAMPLES / 'fog_bell.toml'} --json > /dev/full", shell=True, capture_output=True, text=True, timeout=60
    )
    assert done.returncode == 3
    assert "No space left" in done.stderr
