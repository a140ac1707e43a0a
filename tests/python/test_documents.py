"""The commands that the README shows do what they should, as a reader would type them."""

import os
import re
import shlex
import subprocess
from pathlib import Path

import pytest

TOP = Path(__file__).parents[2]
STRICKLE = os.environ["STRICKLE"]


README = (TOP / "README.md").read_text(encoding="utf-8")


def commands():
    for block in re.findall(r"^```sh\n(.*?)^```", README, flags=re.MULTILINE | re.DOTALL):
        for line in block.splitlines():
            words = shlex.split(line, comments=True)
            if words[:2] == ["cargo", "run"]:
                words = ["strickle", *words[words.index("--") + 1 :]]
            if words[:1] == ["strickle"]:
                yield words[1:]


def run(words, folder):
    (folder / "examples").symlink_to(TOP / "examples")
    return subprocess.run([STRICKLE, *words], cwd=folder, capture_output=True, text=True, timeout=120)


@pytest.mark.parametrize("words", list(commands()), ids=" ".join)
def test_command_of_the_readme(words, tmp_path):
    done = run(words, tmp_path)
    assert done.returncode == 0, done.stderr
    assert done.stdout


def test_the_readme_shows_the_main_job_as_it_is(tmp_path):
    """A mismatch means that the output has changed: look at it, then paste it."""
    words = ["prove", "examples/fog_bell.toml", "-o", "out"]
    assert words in list(commands())
    assert f"```text\n{run(words, tmp_path).stdout}```" in README
