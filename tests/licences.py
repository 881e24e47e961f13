#!/usr/bin/env python3
"""Licences of every crate that ends up in the page or the command: checked against a list, and shipped.

Reads `cargo metadata` (normal and build dependencies of leeway-wasm and leeway-cli) and the licence files in
the crates' own folders. Fails where a licence is not on the list or a crate carries no text of one.
"""
import argparse
import json
import pathlib
import subprocess
import sys

ALLOWED = {"MIT", "Apache-2.0", "BSD-2-Clause", "BSD-3-Clause", "ISC", "Zlib", "Unicode-3.0", "Unlicense", "0BSD",
           "Apache-2.0 WITH LLVM-exception", "CC0-1.0", "MPL-2.0"}
ROOTS = ("leeway-wasm", "leeway-cli")
NAMES = ("LICENSE", "LICENCE", "COPYING", "UNLICENSE", "COPYRIGHT", "NOTICE")
HERE = pathlib.Path(__file__).resolve().parent.parent


def allowed(expression):
    """An SPDX expression holds where one side of each OR, and both sides of each AND, are on the list."""
    text = expression.replace("(", " ").replace(")", " ").replace("/", " OR ")
    return all(any(part.strip() in ALLOWED for part in group.split(" OR ")) for group in text.split(" AND "))


def shipped():
    meta = json.loads(subprocess.run(["cargo", "metadata", "--format-version", "1"], cwd=HERE, check=True,
                                     stdout=subprocess.PIPE).stdout)
    packages = {p["id"]: p for p in meta["packages"]}
    nodes = {n["id"]: n for n in meta["resolve"]["nodes"]}
    seen, todo = set(), [i for i, p in packages.items() if p["name"] in ROOTS]
    while todo:
        node = todo.pop()
        if node in seen:
            continue
        seen.add(node)
        for dep in nodes[node]["deps"]:
            if any(kind["kind"] in (None, "build") for kind in dep["dep_kinds"]):
                todo.append(dep["pkg"])
    return sorted((packages[i] for i in seen), key=lambda p: (p["name"], p["version"]))


def main():
    parser = argparse.ArgumentParser(description=__doc__)
    parser.add_argument("--out", required=True, type=pathlib.Path)
    out = parser.parse_args().out
    texts, wrong, count = {}, [], 0
    lines = ["Leeway is licensed under MIT or Apache-2.0, at your choice.",
             "The page and the command hold these libraries; the texts of their licences follow.", ""]
    for p in shipped():
        if p["source"] is None:
            continue
        count += 1
        label, licence = f'{p["name"]} {p["version"]}', p["license"] or "none stated"
        if not allowed(licence):
            wrong.append(f"{label}: licence {licence} is not on the list")
        folder = pathlib.Path(p["manifest_path"]).parent
        files = sorted(f for f in folder.iterdir() if f.is_file() and f.name.upper().startswith(NAMES))
        if not files:
            wrong.append(f"{label}: no licence text")
        for f in files:
            texts.setdefault(f.read_text(encoding="utf-8", errors="replace").strip(), []).append(f"{label}, {f.name}")
        lines.append(f"  {label}: {licence}")
    if wrong:
        sys.exit("licences:\n  " + "\n  ".join(wrong))
    for text, users in texts.items():
        lines += ["", "=" * 100, *users, "-" * 100, text]
    out.write_text("\n".join(lines) + "\n", encoding="utf-8")
    print(f"   {count} libraries, all on the list of allowed licences")


main()
