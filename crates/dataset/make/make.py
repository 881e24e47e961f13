"""Makes data/leeway-data.txt from its sources; see ../SOURCES.md.

    python make.py --out FILE      write the file
    python make.py --check FILE    make it in memory and name the first line that differs
    python make.py --selftest      load checks and published measurements, printed
"""

import argparse
import sys

import doubt
import names
import nasa
import janaf_fit
import typed
from form import Record, Substance, check, counts, write

VERSION = "2026.12"
ELEMENTS = set(
    "H C N O S P F Cl B Si Al Mg Ca Sr Ba Li Na K Ti Zr Nb Ta V Cr Mo W Mn Fe Co Ni Cu Zn Cd Pb Sn Ar He".split()
)


def build():
    """Sources and substances, in the order of the file."""
    book = {}

    def put(formula, record):
        book.setdefault(formula, Substance(formula)).records.append(record)

    entries = nasa.read()
    for gas, found in ((True, nasa.gases(entries)), (False, nasa.condensed(entries, ELEMENTS))):
        for formula, (entry, phases) in found.items():
            if not gas and formula in typed.NOT_FROM_NASA:
                continue
            put(formula, typed.nasa_record(formula, gas, entry, phases))
    for formula, record in typed.records(book):
        put(formula, record)
    for substance in book.values():
        for gas in (True, False):
            of = [r for r in substance.records if r.gas == gas]
            if not of:
                continue
            key, why = typed.PREFERRED.get((substance.formula, gas), (of[0].source, ""))
            for r in of:
                r.preferred = r.source == key
                r.why = (why or typed.usual_reason(r)) if r.preferred else ""
        substance.name = names.name(substance.formula)
        substance.records.sort(key=lambda r: (not r.gas, not r.preferred, r.source))
    substances = sorted(book.values(), key=order)
    used = {r.source for s in substances for r in s.records}
    sources = {k: v for k, v in typed.SOURCES.items() if k in used}
    return sources, substances


def order(substance):
    """Alphabetical by formula, elements first."""
    return (len(counts(substance.formula)) > 1, substance.formula)


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("--out", metavar="FILE")
    parser.add_argument("--check", metavar="FILE")
    parser.add_argument("--selftest", action="store_true")
    args = parser.parse_args()
    sources, substances = build()
    wrong = check(sources, substances)
    if wrong:
        print("\n".join(wrong), file=sys.stderr)
        return 1
    text = write(VERSION, sources, substances)
    if args.selftest:
        import selftest

        return selftest.run(text, substances)
    if args.check:
        with open(args.check, encoding="utf-8", newline="") as file:
            there = file.read().split("\n")
        here = text.split("\n")
        for k in range(max(len(here), len(there))):
            a = there[k] if k < len(there) else "the end"
            b = here[k] if k < len(here) else "the end"
            if a != b:
                print(f"{args.check}, line {k + 1}: found “{a}”, made “{b}”", file=sys.stderr)
                return 1
        print(f"{args.check}: {len(here) - 1} lines as made")
    if args.out:
        with open(args.out, "w", encoding="utf-8", newline="") as file:
            file.write(text)
        print(f"{args.out}: {len(substances)} substances, {len(text)} bytes")
    return 0


if __name__ == "__main__":
    sys.exit(main())
