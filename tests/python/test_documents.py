"""The commands that the README shows do what they should, as a reader would type them."""

import os
import re
import shlex
import subprocess
from pathlib import Path

import pytest

TOP = Path(__file__).parents[2]
STRICKLE = os.environ["STRICKLE"]


def commands():
    text = (TOP / "README.md").read_text(encoding="utf-8")
    for block in re.findall(r"^```sh\n(.*?)^```", text, flags=re.MULTILINE | re.DOTALL):
        for line in block.splitlines():
            words = shlex.split(line, comments=True)
            if words[:2] == ["cargo", "run"]:
                words = ["strickle", *words[words.index("--") + 1 :]]
            if words[:1] == ["strickle"]:
                yield words[1:]


@pytest.mark.parametrize("words", list(commands()), ids=" ".join)
def test_command_of_the_readme(words, tmp_path):
    (tmp_path / "examples").symlink_to(TOP / "examples")
    done = subprocess.run(
        [STRICKLE, *words], cwd=tmp_path, capture_output=True, text=True, timeout=120
    )
    assert done.returncode == 0, done.stderr
    assert done.stdout


def test_the_readme_shows_the_main_job():
    assert ["prove", "examples/fog_bell.toml", "-o", "out"] in list(commands())
