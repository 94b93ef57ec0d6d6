# SPDX-License-Identifier: MIT
"""The documentation is true: its commands run, its links lead somewhere, and every command and option has its entry.

Usage: docs_commands.py SOURCE_FOLDER DIALWRIGHT
Runs each fenced `sh` block of README.md, DEVELOPERS.md and docs/*.md in a folder that has build/dialwright and designs/. Blocks of
`sh` hold nothing that builds or installs: those are fenced without a language. A YAML block that the text before it tells to save as
a file is saved. Status 3 (made with warnings) is as good as 0. The README's two scripts are run by .ci/run.
"""
import re
import subprocess
import sys
import tempfile
from pathlib import Path

COMMANDS = ("make", "numbers", "shadow", "check", "calibrate", "sun", "sunlight", "fix", "accuracy", "survey", "adjust", "restore")


def blocks(text):
    """Each fenced block: its language, its text, and the line before the fence."""
    for found in re.finditer(r"^```(\w*)\n(.*?)^```$", text, re.MULTILINE | re.DOTALL):
        before = text[:found.start()].rstrip().rsplit("\n", 1)[-1]
        yield found.group(1), found.group(2), before


def run_blocks(page, program, source):
    trouble = []
    with tempfile.TemporaryDirectory() as name:
        folder = Path(name)
        (folder / "build").mkdir()
        (folder / "build/dialwright").symlink_to(program)
        (folder / "designs").symlink_to(source / "designs")
        for language, text, before in blocks(page.read_text(encoding="utf-8")):
            saved = re.search(r"[Ss]ave this as `([^`]+)`", before)
            if language == "yaml" and saved:
                (folder / saved.group(1)).write_text(text, encoding="utf-8")
            if language != "sh":
                continue
            for line in text.replace("\\\n", " ").splitlines():
                done = subprocess.run(["bash", "-o", "pipefail", "-c", line], cwd=folder, capture_output=True, text=True)
                print(f"{page.name}: {line}: {done.returncode}")
                if done.returncode not in (0, 3):
                    trouble.append(f"{page.name}: {line}: status {done.returncode}\n{done.stderr}")
    return trouble


def dead_links(page, source):
    links = re.findall(r"\]\(([^)#]+)[^)]*\)", page.read_text(encoding="utf-8"))
    return [f"{page.name}: there is no {link}" for link in links if "://" not in link and not (page.parent / link).exists()]


def missing_entries(program, source):
    readme = (source / "README.md").read_text(encoding="utf-8")
    manual = (source / "docs/dialwright.1").read_text(encoding="utf-8").replace("\\-", "-")
    completion = (source / "cli/completion/dialwright").read_text(encoding="utf-8")
    top = subprocess.run([program, "--help"], capture_output=True, text=True, check=True).stdout
    told = re.findall(r"^  ([a-z]+) {2,}", top.split("Subcommands:")[1], re.MULTILINE)
    trouble = [] if tuple(told) == COMMANDS else [f"the commands are {told}, this test knows {COMMANDS}"]
    for command in told:
        if f"`dialwright {command} " not in readme:
            trouble.append(f"README.md has no entry for {command}")
        helped = subprocess.run([program, command, "--help"], capture_output=True, text=True, check=True).stdout
        for option in sorted(set(re.findall(r"--[a-z-]+", helped.split("Options:")[1]))) + [command]:
            for name, text in (("docs/dialwright.1", manual), ("cli/completion/dialwright", completion)):
                if option not in text:
                    trouble.append(f"{name} has no entry for {command} {option}")
    return trouble


def main():
    source, program = Path(sys.argv[1]).resolve(), Path(sys.argv[2]).resolve()
    pages = [source / "README.md", source / "DEVELOPERS.md", *sorted((source / "docs").glob("*.md"))]
    trouble = missing_entries(program, source)
    for page in pages:
        trouble += dead_links(page, source) + run_blocks(page, program, source)
    print("\n".join(trouble))
    sys.exit(1 if trouble else 0)


main()
