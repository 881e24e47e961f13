"""Makes ../janaf_dfg.csv: free energies of formation by the NIST-JANAF tables for every phase that our data file
also holds, at 298.15, 600, 1000 and 1400 K.

    python janaf_dfg.py --out FILE     write the table
    python janaf_dfg.py --check FILE   make it in memory and name the first line that differs
    python janaf_dfg.py --rate         compare with our data file and print what lies outside

The values are computed from each table's own H - H(298), S and dfH(298), and from the tables of the elements in their
reference states, not read from the column dfG: that column disagrees with H and S in some tables.
"""

import argparse
import csv
import io
import json
import math
import re
import sys
from importlib import resources
from pathlib import Path

DATA = Path(__file__).resolve().parents[3] / "crates/dataset/data/leeway-data.txt"
TEMPERATURES = (298.15, 600.0, 1000.0, 1400.0)
T0 = 298.15
GASEOUS = {"H": "H2", "N": "N2", "O": "O2", "F": "F2", "Cl": "Cl2", "Ar": "Ar", "He": "He"}
# Elements whose reference state in the tables turns into the ideal gas: formula of the gas, K
BOILS = {
    "S": ("S2", 882.117), "P": ("P2", 1180.008), "Zn": ("Zn", 1180.173), "Na": ("Na", 1170.525), "K": ("K", 1039.540), "Mg": ("Mg", 1366.104),
}
# Carried as a stand-in of varying composition in our file; the table is of a solid that does not exist.
NOT_COMPARED = {("FeO", "condensed")}
# Tables of an isomer: ethylene oxide where we hold ethanal.
NOT_THE_SAME = {"C-129"}

EXCEPTIONS = Path(__file__).resolve().parents[1] / "exceptions.csv"


def counts(formula):
    """Element counts of a formula with brackets and decimal subscripts."""
    total = {}
    for piece in re.split(r"(?<![0-9])\.", formula):
        stack = [{}]
        for token, n in re.findall(r"([A-Z][a-z]?|\(|\)|\[|\])([0-9]*\.?[0-9]*)", piece):
            n = float(n) if n else 1.0
            if token in "([":
                stack.append({})
                continue
            inner = stack.pop() if token in ")]" else {token: 1.0}
            for symbol, k in inner.items():
                stack[-1][symbol] = stack[-1].get(symbol, 0) + k * n
        for symbol, k in stack[0].items():
            total[symbol] = total.get(symbol, 0) + k
    return total


# --- our data file -------------------------------------------------------------------------------------------


def read_data(path):
    """Records of the data file: dicts with formula, class, set, preferred, u_h, u_s, phases."""
    records, formula = [], None
    for line in path.read_text("utf-8").split("\n"):
        words = line.split()
        if not words or words[0].startswith("#"):
            continue
        key, rest = words[0], words[1:]
        if key == "substance":
            formula = rest[0]
        elif key == "set":
            records.append({"formula": formula, "set": rest[0], "preferred": "preferred" in rest, "phases": []})
        elif key in ("H298", "S298"):
            records[-1]["u_" + key[0].lower()] = float(rest[2])
        elif key == "phase":
            records[-1]["class"] = "gas" if rest[1] == "g" else "condensed"
            records[-1]["phases"].append({"name": rest[0], "state": rest[1], "special": rest[4:] != [], "spans": []})
        elif key == "span":
            terms = [tuple(map(float, x.split(":"))) for x in rest[7:]]
            records[-1]["phases"][-1]["spans"].append((float(rest[0]), float(rest[1]), float(rest[3]), float(rest[5]), terms))
    return records


def values(phase, t):
    """H and S of a phase, J and J/K, or None outside its range."""
    for low, high, h, s, terms in phase["spans"]:
        if low <= t <= high:
            for e, c in terms:
                h += c * math.log(t) if e == -1 else c * t ** (e + 1) / (e + 1)
                s += c * math.log(t) if e == 0 else c * t**e / e
            return h, s
    return None


def stable(record, t):
    """(phase, H, S) of least G at a temperature; boundaries and metastable forms left out."""
    best = None
    for phase in record["phases"]:
        v = None if phase["special"] else values(phase, t)
        if v and (best is None or v[0] - t * v[1] < best[1] - t * best[2]):
            best = (phase, *v)
    return best


# --- the tables ----------------------------------------------------------------------------------------------


def tables():
    """Table number to (formula, name, phase), and the same by element counts and class."""
    book = json.loads(resources.files("janaf").joinpath("janaf.json").read_text("utf-8"))
    index, by = {}, {}
    for text, number in zip(book["display"], book["index"]):
        m = re.match(r"^([^,]+), (.+) \(([^)]+)\)$", text)
        if not m or "+" in m[1] or "-" in m[1] or "Ion" in m[2]:
            continue
        index[number] = m.groups()
        kind = {"g": "gas", "ref": "ref"}.get(m[3], "condensed")
        if m[3] in ("g", "ref", "cr", "l", "cr,l"):
            by.setdefault((tuple(sorted(counts(m[1]).items())), kind), []).append(number)
    return index, by


ROWS = {}


def rows(number):
    """Rows (T, S, H - H298 in kJ, dfH, dfG) of a table."""
    if number not in ROWS:
        text = resources.files("janaf").joinpath(f"data/{number}.txt").read_text("utf-8")
        out = []
        for line in text.split("\n")[2:]:
            cells = [c.strip() for c in line.split("\t")]
            try:
                t, s, h = float(cells[0]), float(cells[2]), float(cells[4])
            except (ValueError, IndexError):
                continue
            more = []
            for k in (5, 6):
                try:
                    more.append(float(cells[k]))
                except (ValueError, IndexError):
                    more.append(None)
            out.append((t, s, h, *more))
        ROWS[number] = out
    return ROWS[number]


def at(number, t):
    for row in rows(number):
        if abs(row[0] - t) < 1e-6:
            return row
    return None


def reference(by, symbol, t):
    """(label, H - H298 in kJ, S, per atom) of an element in its reference state."""
    gas = GASEOUS.get(symbol)
    formula = gas or symbol
    numbers = by.get((tuple(sorted(counts(formula).items())), "ref"))
    row = at(numbers[0], t) if numbers else None
    if row is None:
        return None
    n = counts(formula)[symbol]
    if gas:
        return f"{gas}(g)", row[2] / n, row[1] / n, n
    if symbol in BOILS and t > BOILS[symbol][1]:
        vapour = BOILS[symbol][0]
        return f"{vapour}(g)", row[2], row[1], counts(vapour)[symbol]
    melted = melting(by, symbol)
    return f"{symbol}({'l' if melted and t > melted else 's'})", row[2], row[1], 1


def melting(by, symbol):
    """Melting point of an element: where its table of the reference state says LIQUID."""
    number = by[(((symbol, 1.0),), "ref")][0]
    text = resources.files("janaf").joinpath(f"data/{number}.txt").read_text("utf-8")
    for line in text.split("\n"):
        if "<--> LIQUID" in line:
            return float(line.split("\t")[0])
    return None


def choose(index, by, record, phase, h, t):
    """The table for a phase of ours at a temperature."""
    key = tuple(sorted(counts(record["formula"]).items()))
    found = [n for n in by.get((key, record["class"]), []) if n not in NOT_THE_SAME and at(n, t) and at(n, T0) and at(n, T0)[3] is not None]
    if not found:
        return None

    def total(n):
        """H of formation scale, kJ."""
        return at(n, T0)[3] + at(n, t)[2]

    if record["class"] == "gas":
        return min(found, key=lambda n: (abs(total(n) - h / 1000), n))
    liquids = [n for n in found if index[n][2] == "l"]
    solids = [n for n in found if index[n][2] == "cr"]
    both = [n for n in found if index[n][2] == "cr,l"]
    named = [n for n in solids if phase["name"].split("-")[0] in index[n][1].lower()]

    def melt(n):
        return any(abs(at(n, t)[1] - at(m, t)[1]) < 0.02 for m in liquids)

    def g(n):
        return total(n) - t * at(n, t)[1] / 1000

    if phase["state"] == "l":
        fits = [n for n in both if melt(n)] or liquids
    elif named:
        fits = named
    else:
        fits = [n for n in both if not melt(n)] or solids
    return min(fits, key=lambda n: (g(n), n)) if fits else None


def make():
    """Rows of the file and, for --rate, our values beside them."""
    index, by = tables()
    made = []
    for record in read_data(DATA):
        if (record["formula"], record["class"]) in NOT_COMPARED:
            continue
        for t in TEMPERATURES:
            ours = stable(record, t)
            if not ours:
                continue
            phase, h, s = ours
            number = choose(index, by, record, phase, h, t)
            if number is None:
                continue
            _, ts, th, _, column = at(number, t)
            h298 = at(number, T0)[3]
            parts, dh, ds = [], h298 + th, ts
            for symbol, n in sorted(counts(record["formula"]).items()):
                ref = reference(by, symbol, t)
                if ref is None:
                    parts = None
                    break
                label, eh, es, per = ref
                parts.append(f"{round(n / per, 6):g} {label}")
                dh -= n * eh
                ds -= n * es
            if not parts:
                continue
            dg = dh - t * ds / 1000
            note = ""
            if column is not None and abs(dg - column) > 0.3:
                note = "column dfG disagrees with the table's own H and S"
                if "Cr" in counts(record["formula"]):
                    note = "column dfG made with an older table of chromium"
            made.append({
                "formula": record["formula"], "class": record["class"], "set": record["set"], "phase": phase["name"],
                "state": phase["state"], "t_k": f"{t:g}", "table": number, "dfh298_kj": f"{h298:.3f}", "h_minus_h298_kj": f"{th:.3f}",
                "s_j_per_k": f"{ts:.3f}", "dfh_kj": f"{dh:.3f}", "dfg_kj": f"{dg:.3f}",
                "dfg_column_kj": "" if column is None else f"{column:.3f}", "elements": " + ".join(parts),
                "table_note": note, "own_fit": "yes" if record["set"] == "JANAF-1998" else "no",
                "_record": record, "_h": h, "_s": s, "_parts": parts, "_dg": dg,
            })
    return made


HEAD = """\
# Free energies of formation by the NIST-JANAF tables, for phases that our data file holds in any of its sets.
# Source: Chase, M. W. (1998). NIST-JANAF Thermochemical Tables, 4th ed. J. Phys. Chem. Ref. Data, Monograph 9 (NIST Standard
#   Reference Database 13); read from the package janaf 1.4.0. Made by make/janaf_dfg.py.
# dfg_kj, dfh_kj: computed from the table's dfH(298.15 K), H - H(298.15 K) and S and the tables of the elements; kJ/mol, 1 bar.
# dfg_column_kj: the table's own column; table_note says where H and S do not give it (misprints, an older table of an element).
# elements: what the substance is formed from, and in which state: the reference state of the tables, so S2(g) above 882.1 K,
#   K(g) above 1039.5, Na(g) above 1170.5, P2(g) above 1180.0, Zn(g) above 1180.2, Mg(g) above 1366.1; else (s) or (l), white P.
#   Form dfG from the preferred records of just these.
# set, phase, state: the record of ours. own_fit: it is fitted to these very tables and proves nothing but the fit.
# exceptions.csv names every difference beyond 2 kJ and beyond twice our standard uncertainty, with its reason.
"""
COLUMNS = (
    "formula class set phase state t_k table dfh298_kj h_minus_h298_kj s_j_per_k dfh_kj dfg_kj dfg_column_kj elements table_note own_fit"
).split()


def text(made):
    out = io.StringIO()
    out.write(HEAD)
    writer = csv.DictWriter(out, COLUMNS, extrasaction="ignore", lineterminator="\n")
    writer.writeheader()
    writer.writerows(made)
    return out.getvalue()


def rate(made):
    """Prints what lies outside, and the share inside; returns the number of rows outside without a reason."""
    with EXCEPTIONS.open(encoding="utf-8", newline="") as file:
        lines = csv.DictReader(line for line in file if not line.startswith("#"))
        reasons = {(r["formula"], r["class"], r["set"]): r for r in lines}
    records = {(r["formula"], r["class"]): r for r in read_data(DATA) if r["preferred"]}

    def element(label, t):
        formula, state = re.match(r"^(.+)\((.)\)$", label).groups()
        record = records[(formula, "gas" if state == "g" else "condensed")]
        fits = [v for p in record["phases"] if p["state"] == state and (v := values(p, t))]
        if not fits:  # an element that melts within a few kelvin of elsewhere
            best = stable(record, t)
            fits = [best[1:]]
        return min(h - t * s for h, s in fits)

    tally, bare, named = {}, 0, {}
    for row in made:
        record, t = row["_record"], float(row["t_k"])
        dg = row["_h"] - t * row["_s"]
        try:
            for part in row["_parts"]:
                n, label = part.split()
                dg -= float(n) * element(label, t)
        except (KeyError, TypeError) as e:
            print("not formed", row["formula"], row["t_k"], e)
            continue
        off = dg / 1000 - row["_dg"]
        k2 = 2 * math.hypot(record["u_h"], t * record["u_s"] / 1000)
        inside = abs(off) <= max(2.0, k2)
        strict = abs(off) <= 2.0
        if row["own_fit"] == "yes":
            groups = ["fits to these tables"]
        else:
            groups = ["all others"]
            if record["preferred"]:
                groups += ["preferred, not fitted to these tables", f"of these, {row['class']}"]
        if record["preferred"]:
            groups.append("preferred, all")
        for group in groups:
            a = tally.setdefault(group, {}).setdefault(t, [0, 0, 0])
            a[0] += inside
            a[1] += 1
            a[2] += strict
        if not inside:
            reason = reasons.get((row["formula"], row["class"], row["set"]))
            listed = reason is not None and f"{t:g}" in reason["t_k"].split()
            key = (row["formula"], row["class"], row["set"], row["table"], record["preferred"], reason["reason"] if listed else "")
            named.setdefault(key, []).append(f"{t:g} K {off:+.1f} (k=2 {k2:.1f})")
            bare += not listed
    for key, list_ in named.items():
        print(*key[:4], "preferred" if key[4] else "", ";", ", ".join(list_), ";", key[5] or "NO REASON")
    for group, by_t in tally.items():
        good, n, near = (sum(a[k] for a in by_t.values()) for k in range(3))
        print(f"{group}: {good} of {n} = {100 * good / n:.1f} % (within 2 kJ alone {100 * near / n:.1f} %); "
              + ", ".join(f"{t:g} K {100 * a[0] / a[1]:.1f} % of {a[1]}" for t, a in by_t.items()))
    return bare


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("--out")
    parser.add_argument("--check")
    parser.add_argument("--rate", action="store_true")
    args = parser.parse_args()
    made = make()
    if args.rate:
        return 1 if rate(made) else 0
    here = text(made)
    if args.out:
        Path(args.out).write_text(here, "utf-8", newline="\n")
        print(f"{args.out}: {len(made)} rows")
    if args.check:
        there = Path(args.check).read_text("utf-8")
        for k, (a, b) in enumerate(zip(there.split("\n") + [""], here.split("\n") + [""])):
            if a != b:
                print(f"{args.check}, line {k + 1}: found “{a}”, made “{b}”", file=sys.stderr)
                return 1
        if len(there) != len(here):
            print(f"{args.check}: {len(there)} characters, made {len(here)}", file=sys.stderr)
            return 1
        print(f"{args.check}: as made")
    return 0


if __name__ == "__main__":
    sys.exit(main())
