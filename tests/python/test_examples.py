"""The example part files, read by another TOML parser than the program's."""

import tomllib
from pathlib import Path

import pytest

EXAMPLES = sorted((Path(__file__).parents[2] / "examples").glob("*.toml"))


def test_there_are_examples():
    assert len(EXAMPLES) >= 10


@pytest.mark.parametrize("path", EXAMPLES, ids=lambda path: path.stem)
def test_is_toml_of_format_1(path):
    part = tomllib.loads(path.read_text(encoding="utf-8"))
    assert part["format"] == 1
    assert part["part"]["name"]
    assert part["body"]
