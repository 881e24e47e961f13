"""Evaluates the preferred records against published measurements and prints the result.

Each row: what, made here, wanted, tolerance. A row that misses is printed as such and makes the run fail,
unless its reason stands in KNOWN.
"""

from math import exp, log

from build import R
from form import T0, atoms

RGAS = float(R)

# Rows that miss what is wanted, and why. Nothing is tuned to meet them.
KNOWN = {
    "4 FeO = Fe + Fe3O4 turns, K": "The preferred Fe3O4 (JANAF, 1965 evaluation) is 1.6 kJ per O2 more stable at 843 K than the galvanic "
    "cells of wustite ask for. The newer sets beside it turn at 826 to 838 K, but miss iron-magnetite below 300 C by 18 to 30 %.",
}


class Book:
    def __init__(self, substances):
        self.by = {s.formula: s for s in substances}

    def g(self, formula, t, gas=False, beside=()):
        record = self.by[formula].best(gas)
        for p in record.phases:
            if p.beside and p.beside in beside and p.low - 60 < t <= p.high:
                return float(p.at(max(t, p.low)).G(t))
        first = record.phases[0]
        if first.low - 60 < t < first.low:
            return float(first.spans[0].G(t))
        return float(record.values(t).G(t))

    def h(self, formula, t, gas=False):
        return float(self.by[formula].best(gas).values(t).H(t))


def bisect(f, a, b):
    fa = f(a)
    if (fa > 0) == (f(b) > 0):
        return float("nan")
    for _ in range(80):
        m = (a + b) / 2
        if (f(m) > 0) == (fa > 0):
            a = m
        else:
            b = m
    return (a + b) / 2


def ice(t):
    """Saturation pressure over ice, Pa (Sonntag 1990)."""
    return exp(-6024.5282 / t + 29.32707 + 1.0613868e-2 * t - 1.3198825e-5 * t * t - 0.49382577 * log(t))


def frost(x):
    """Frost point in C of a water fraction at 1 atm."""
    return bisect(lambda t: ice(t) - x * 101325, 170, 273.16) - 273.15


GASES = set("H2O H2 O2 CO CO2 CH4 N2 NH3 SO2 SO3 H2S Mn Mg".split())


def run(text, substances):
    book = Book(substances)
    rows = []

    def dg(equation, t):
        """Standard G of an equation `2 A + B = C`; a species with (g) is the gas."""
        left, right = equation.split(" = ")
        species = []
        for side, sign in ((left, -1), (right, 1)):
            for term in side.split(" + "):
                parts = term.split()
                n = float(parts[0]) if len(parts) == 2 else 1.0
                species.append((sign * n, parts[-1]))
        names = [f for _, f in species]
        return sum(n * book.g(f.replace("(g)", ""), t, gas=f.endswith("(g)"), beside=names) for n, f in species)

    def k(equation, t):
        return exp(-dg(equation, t) / RGAS / t)

    def row(what, made, wanted, tolerance, relative=True):
        off = (made / wanted - 1) if relative else made - wanted
        rows.append((what, made, wanted, off, tolerance, relative))

    def ratio(what, equation, celsius, wanted, tolerance, power=1.0):
        for c, w in zip(celsius, wanted):
            row(f"{what} at {c} C", k(equation, c + 273.15) ** power, w, tolerance)

    C = lambda kelvin: kelvin - 273.15
    # gas reactions
    ratio("shift K", "CO(g) + H2O(g) = CO2(g) + H2(g)", (500, 600, 700, 800, 900, 1000), (5.11, 2.66, 1.61, 1.08, 0.785, 0.604), 0.01)
    row("shift K = 1, C", C(bisect(lambda t: dg("CO(g) + H2O(g) = CO2(g) + H2(g)", t), 900, 1300)), 823, 1, False)
    ratio("Boudouard K", "C + CO2(g) = 2 CO(g)", (700, 800, 900, 1000), (1.00, 7.12, 35.9, 139), 0.015)
    row("CH4 = C + 2 H2, K = 1, C", C(bisect(lambda t: dg("CH4(g) = C + 2 H2(g)", t), 600, 1000)), 546, 2, False)
    row("CH4 + H2O = CO + 3 H2, K = 1, C", C(bisect(lambda t: dg("CH4(g) + H2O(g) = CO(g) + 3 H2(g)", t), 600, 1100)), 619, 2, False)
    # iron
    ratio("Fe/FeO H2O/H2", "FeO + H2(g) = Fe + H2O(g)", (600, 700, 800, 900, 1000), (0.332, 0.422, 0.499, 0.594, 0.669), 0.05)
    ratio("Fe/Fe3O4 H2/H2O", "0.75 Fe + H2O(g) = 0.25 Fe3O4 + H2(g)", (200, 300, 400, 500), (128, 27.5, 10.0, 4.99), 0.15)
    row(
        "Fe/FeO and FeO/Fe3O4 meet, K",
        bisect(lambda t: dg("FeO + H2(g) = Fe + H2O(g)", t) - dg("Fe3O4 + H2(g) = 3 FeO + H2O(g)", t), 834, 1000), 843, 10, False,
    )
    row("4 FeO = Fe + Fe3O4 turns, K", bisect(lambda t: dg("4 FeO = Fe + Fe3O4", t), 783, 1000), 843, 10, False)
    air = lambda t: RGAS * t * log(0.21)
    row("6 Fe2O3 = 4 Fe3O4 + O2 in 0.21 bar, C", C(bisect(lambda t: dg("6 Fe2O3 = 4 Fe3O4 + O2(g)", t) + air(t), 1300, 1730)), 1384, 10, False)
    row("4 CuO = 2 Cu2O + O2 in 0.21 bar, C", C(bisect(lambda t: dg("4 CuO = 2 Cu2O + O2(g)", t) + air(t), 1000, 1400)), 1024, 10, False)
    row("2 Co3O4 = 6 CoO + O2 in 0.21 bar, C", C(bisect(lambda t: dg("2 Co3O4 = 6 CoO + O2(g)", t) + air(t), 900, 1300)), 898, 10, False)
    # metals and oxides
    ratio("Co/CoO H2O/H2", "CoO + H2(g) = Co + H2O(g)", (450, 515, 570), (67.0, 57.0, 50.5), 0.03)
    ratio("Ni/NiO H2O/H2", "NiO + H2(g) = Ni + H2O(g)", (500, 700, 900), (285, 196, 146), 0.02)
    ratio("Ni/NiO pO2, bar", "2 NiO = 2 Ni + O2(g)", (900,), (1.1e-12,), 0.02)
    ratio("Cu/Cu2O pO2, bar", "2 Cu2O = 4 Cu + O2(g)", (900,), (4.1e-8,), 0.03)
    # Holmes, O'Neill and Arculus (1986), Geochim. Cosmochim. Acta 50, 2439: galvanic cells, 1300 K, good to 0.1-0.2 kJ
    for equation, w in (
        ("2 Cu + 0.5 O2(g) = Cu2O", -73.950), ("Ni + 0.5 O2(g) = NiO", -123.555), ("Co + 0.5 O2(g) = CoO", -142.150),
        ("0.947 Fe + 0.5 O2(g) = Fe0.947O", -179.459),
    ):
        row(f"{equation}, kJ at 1300 K", dg(equation, 1300) / 1000, w, 1.0 if "Fe" in equation else 0.3, False)
    ratio("W/WO2 H2O/H2", "WO2 + 2 H2(g) = W + 2 H2O(g)", (800, 900, 1000), (0.37, 0.55, 0.76), 0.12, 0.5)
    ratio("Mo/MoO2 H2O/H2", "MoO2 + 2 H2(g) = Mo + 2 H2O(g)", (800, 900, 1000), (0.41, 0.61, 0.82), 0.12, 0.5)
    chrome = lambda c, a=1.0: (k("Cr2O3 + 3 H2(g) = 2 Cr + 3 H2O(g)", c + 273.15) / a**2) ** (1 / 3)
    for c, w in ((900, -44.1), (1000, -35.2), (1100, -27.1), (1200, -19.6)):
        r = chrome(c)
        row(f"Cr/Cr2O3 frost point at {c} C", frost(r / (1 + r)), w, 2, False)
    for a, w in ((0.25, -21.9), (0.4, -25.0), (0.15, -18.2)):
        r = chrome(1050, a)
        row(f"Cr/Cr2O3 frost point at 1050 C, a = {a}", frost(r / (1 + r)), w, 2, False)
    ratio("Si/SiO2 H2O/H2", "SiO2 + 2 H2(g) = Si + 2 H2O(g)", (1000,), (1.9e-7,), 0.10, 0.5)
    ratio("Ti/TiO2 H2O/H2", "TiO2 + 2 H2(g) = Ti + 2 H2O(g)", (1000,), (4.4e-8,), 0.10, 0.5)
    ratio("V/V2O3 H2O/H2", "V2O3 + 3 H2(g) = 2 V + 3 H2O(g)", (1000,), (1.15e-5,), 0.30, 1 / 3)
    ratio("Mn/MnO H2O/H2", "MnO + H2(g) = Mn + H2O(g)", (800,), (1.9e-6,), 0.1)
    ratio("Cr/Cr2N pN2, bar", "2 Cr2N = 4 Cr + N2(g)", (900, 1000, 1100), (2.8e-4, 1.8e-3, 9.1e-3), 0.15)
    ratio("Al/AlN pN2, bar", "2 AlN = 2 Al + N2(g)", (1000,), (2.1e-15,), 2.0)
    # carbonates
    atm = lambda t: RGAS * t * log(1.01325)
    for p, w in ((0.05, 716), (0.10, 751), (0.20, 788), (0.30, 811), (1.0, 887)):
        t = bisect(lambda t: dg("CaCO3 = CaO + CO2(g)", t) + RGAS * t * log(p * 1.01325), 800, 1300)
        row(f"calcite turns at {p} atm CO2, C", C(t), w, 10, False)
    t = bisect(lambda t: dg("MgCO3 = MgO + CO2(g)", t) + atm(t), 400, 990)
    row("magnesite turns at 1 atm CO2, C", C(t), 415, 13, False)

    def heat(equation, t):
        left, right = equation.split(" = ")
        total = 0
        for side, sign in ((left, -1), (right, 1)):
            for term in side.split(" + "):
                parts = term.split()
                n = float(parts[0]) if len(parts) == 2 else 1.0
                f = parts[-1]
                total += sign * n * book.h(f.replace("(g)", ""), t, f.endswith("(g)"))
        return total / 1000

    row("heat of calcite at 25 C, kJ", heat("CaCO3 = CaO + CO2(g)", T0), 178.2, 0.005)
    row("heat of calcite at 900 C, kJ", heat("CaCO3 = CaO + CO2(g)", 1173.15), 165.5, 0.005)
    row("heat of magnesite at 25 C, kJ", heat("MgCO3 = MgO + CO2(g)", T0), 117, 0.02)
    row("heat of dolomite at 25 C, kJ", heat("CaMg(CO3)2 = CaO + MgO + 2 CO2(g)", T0), 301.6, 0.01)
    t = bisect(lambda t: dg("CaMg(CO3)2 = CaCO3 + MgO + CO2(g)", t) + RGAS * t * log(0.25 * 1.01325), 500, 1000)
    row("dolomite half turns at 0.25 atm, C", C(t), 384, 10, False)
    row("MgO + Al2O3 = MgAl2O4, kJ at 1100 K", dg("MgO + Al2O3 = MgAl2O4", 1100) / 1000, -30.1, 3, False)
    row("MgO + Cr2O3 = MgCr2O4, kJ at 1300 K", dg("MgO + Cr2O3 = MgCr2O4", 1300) / 1000, -38.2, 0.5, False)
    t = bisect(lambda t: dg("3 Fe + C = Fe3C", t), 800, 1400)
    row("3 Fe + C = Fe3C turns, K", t, 1087, 15, False)
    t = 673.15
    row("Fe4N, NH3 in NH3-H2 at 400 C, KN atm^-1/2", k("Fe4N + 1.5 H2(g) = 4 Fe + NH3(g)", t) * 1.01325**0.5, 0.74, 0.02)
    row("Fe2O3 + 3 H2, kJ", heat("Fe2O3 + 3 H2(g) = 2 Fe + 3 H2O(g)", T0), 98.8, 0.02)

    missed = 0
    for what, made, wanted, off, tolerance, relative in rows:
        ok = abs(off) <= tolerance
        mark = "ok  " if ok else "why " if what in KNOWN else "MISS"
        missed += mark == "MISS"
        shown = f"{100 * off:+.1f} % of {100 * tolerance:g} %" if relative else f"{off:+.1f} of {tolerance:g}"
        print(f"{mark} {what:48} {made:10.4g}  wanted {wanted:8.4g}  {shown}")
        if not ok and what in KNOWN:
            print(f"     {KNOWN[what]}")
    records = [r for s in substances for r in s.records]
    phases = [p for r in records for p in r.phases]
    elements = sorted({e for s in substances for e in __import__("form").counts(s.formula)})
    print(f"{len(substances)} substances, {len(records)} sets ({sum(r.gas for r in records)} gas), {len(phases)} phases, "
          f"{sum(len(p.spans) for p in phases)} spans, {len(elements)} elements, {len(text.encode())} bytes")
    print(f"{len(rows)} rows, {missed} missed without a reason")
    return 1 if missed else 0
