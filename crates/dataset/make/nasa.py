"""Reads the NASA Glenn nine-coefficient file (thermo.inp of the package pyglenn).

The .inp text is parsed, not the package's database: the database lost the 0.947 of wustite and keys records
by name, while several records of one phase carry the same name.
"""

import re
from dataclasses import dataclass, field
from importlib import resources

from mpmath import mpf

from form import T0, Phase, Span, counts, span

# The coefficients were fitted with this R; the CODATA value of today would move H by 6 parts in a million.
R = 8.314510


@dataclass
class Interval:
    low: float
    high: float
    exponents: list
    coefficients: list
    b1: float
    b2: float


@dataclass
class Entry:
    name: str
    comment: str
    code: str
    elements: dict
    condensed: int
    h298: float
    intervals: list = field(default_factory=list)


def number(text):
    text = text.strip().replace("D", "e").replace("d", "e")
    # Fortran leaves a blank where the sign of an exponent would stand
    text = re.sub(r"e\s+", "e+", text)
    return float(text) if text else 0.0


def read():
    """All product entries, in the order of the file."""
    text = resources.files("pyglenn").joinpath("data/thermo.inp").read_text("latin-1")
    lines = [line.rstrip("\r") for line in text.split("\n")]
    i = lines.index(next(l for l in lines if l.strip() == "thermo")) + 2
    entries = []
    while not lines[i].startswith("END PRODUCTS"):
        if not lines[i].strip() or lines[i].startswith("!"):
            i += 1
            continue
        name, comment = lines[i][:18].strip(), lines[i][18:].strip()
        head = lines[i + 1]
        elements = {}
        for k in range(5):
            symbol = head[10 + 8 * k : 12 + 8 * k].strip()
            count = number(head[12 + 8 * k : 18 + 8 * k])
            if symbol and count:
                elements[symbol.capitalize()] = elements.get(symbol.capitalize(), 0) + count
        entry = Entry(name, comment, head[3:9].strip(), elements, int(head[50:52]), number(head[65:80]))
        n = int(head[:2])
        i += 2
        for _ in range(n):
            span, first, second = lines[i], lines[i + 1], lines[i + 2]
            exponents = [number(span[23 + 5 * k : 28 + 5 * k]) for k in range(int(span[22]))]
            numbers = [number(first[16 * k : 16 * k + 16]) for k in range(5)]
            numbers += [number(second[16 * k : 16 * k + 16]) for k in range(2)]
            entry.intervals.append(
                Interval(
                    number(span[1:11]),
                    number(span[11:22]),
                    exponents,
                    numbers[: len(exponents)],
                    number(second[48:64]),
                    number(second[64:80]),
                )
            )
            i += 3
        if n == 0:
            i += 1
        entries.append(entry)
    return entries


# --- what is taken, and how it is named ------------------------------------------------------------------

# Gases of the elements of the charge and of furnace atmospheres: molecules, not their exotic radicals;
# organic molecules to C2 only.
GASES = """
Ar He H H2 N N2 O O2 O3 F F2 CL CL2 S S2 S3 S4 S5 S6 S7 S8 P P2 P4 C C2 B B2 Si Si2 AL AL2 Mg Ca Sr Ba Li Li2 Na Na2 K K2
Ti Zr Nb Ta V Cr Mo W Mn Fe Co Ni Cu Cu2 Zn Cd Pb Sn
H2O OH HO2 H2O2 NH NH2 NH3 N2H4 NO NO2 N2O N2O3 N2O4 N2O5 HNO2 HNO3 HCL HF HOCL CLO CLO2 CL2O H2S SH SO SO2 SO3 S2O H2SO4
PH3 PH2 PN PO PO2 P4O6 P4O10 PCL3 PCL5 POCL3 PF3 PF5 PS
CO CO2 COS CS CS2 CN C2N2 HCN HNCO COCL2 COCL CCL4 CCL3 CHCL3 CH2CL2 CH3CL CF4 CHF3 CH3F C2F4 C2F6 C2CL4 COF2 CH3 CH4
C2H2,acetylene C2H4 C2H6 C2H5 CH3OH HCHO,formaldehy HCO HCOOH C2H5OH C2H
CH3CHO,ethanal CH2
BCL3 BF3 BO BO2 B2O3 B2O2 HBO HBO2 H3BO3 BH3 B2H6 BN BCL BF BOF BS
SiO SiO2 SiH4 SiH SiCL4 SiCL3 SiCL2 SiCL SiHCL3 SiH2CL2 SiH3CL SiF4 SiF2 SiF SiS SiS2 SiN SiC SiC2
ALCL ALCL2 ALCL3 AL2CL6 ALF ALF2 ALF3 AL2F6 ALO AL2O AL2O2 ALOH ALN ALS AL2S AL(OH)3 ALO2 ALH
MgO MgOH Mg(OH)2 MgCL MgCL2 MgF2 MgS CaO CaOH Ca(OH)2 CaCL CaCL2 CaF2 CaS SrO SrOH Sr(OH)2 SrCL2 SrF2 SrS BaO BaOH Ba(OH)2 BaCL2
BaF2 BaS
LiOH LiCL Li2CL2 Li3CL3 LiF Li2F2 LiO Li2O LiH LiBO2 Li2SO4
NaOH Na2O2H2 NaCL Na2CL2 NaF Na2F2 NaO Na2O NaH NaCN NaBO2 NaALF4 Na2SO4
KOH K2O2H2 KCL K2CL2 KF K2F2 KO K2O KH KCN KBO2 KALF4 K2SO4 K2CO3
TiO TiO2 TiCL2 TiCL3 TiCL4 TiOCL2 ZrO ZrO2 ZrN NbO NbO2 NbCL5 NbOCL3 TaO TaO2 TaCL5 VO VO2 V4O10 VCL4 VN
CrO CrO2 CrO3 CrN MoO MoO2 MoO3 Mo2O6 Mo3O9 Mo4O12 Mo5O15 WO WO2 WO3 (WO3)2 (WO3)3 (WO3)4 WCL6 WOCL4 WO2CL2
FeO Fe(OH)2 FeCL FeCL2 FeCL3 Fe2CL4 Fe2CL6 NiO NiCL NiCL2 NiS CuO CuOH CuCL Cu3CL3 CuF CuF2
PbO PbO2 PbCL PbCL2 PbCL4 PbF2 PbS SnO SnO2 SnCL2 SnCL4 SnF2 SnS SF6 SF4 SOF2 SO2F2 SO2CL2 S2CL2 SCL2 NF3 NOCL
""".split()

# Condensed names skipped: rocket propellants and records that another source replaces outright.
SKIP = {
    "ALH3", "B3O3H3", "BaH2", "LiNO2", "NaNO2", "KNO2", "MgH2", "NaO2", "KO2", "SCL2", "S2CL2", "K3ALF6", "Li3ALF6",
    "Na5AL3F14", "NbOCL3", "WOCL4", "SrH2", "NH4F", "KH", "NaH", "K(HF2)", "SnF2", "VCL2", "B2S3", "FeOCL", "Li2O2",
    # wrong in the source, no better one at hand or replaced by a JANAF fit (SOURCES.md)
    "CuCL", "CuF", "Cu(OH)2", "K2O2", "CuCL2",
}

PHASES = {
    "SiO2": {"a-qz": "quartz-alpha", "b-qz": "quartz-beta", "b-crt": "cristobalite"},
    "Al2O3": {"a": "corundum"}, "Al2SiO5": {"an": "andalusite"}, "C": {"gr": "graphite"},
    "Fe": {"a": "alpha", "c": "gamma", "d": "delta"}, "Fe0.947O": {"cr": "wustite"},
    "Fe2O3": {"cr": "hematite"}, "Fe3O4": {"cr": "magnetite"}, "CaCO3": {"cr": "calcite"}, "MgCO3": {"cr": "magnesite"},
    "H2O": {"cr": "ice", "L": "water"}, "TiO2": {"cr": "rutile"}, "FeS": {"a": "troilite", "b": "beta", "c": "pyrrhotite"},
    "FeS2": {"cr": "pyrite"}, "PbO": {"II-r": "red", "I-y": "yellow"}, "MgO": {"cr": "periclase"}, "CaO": {"cr": "lime"},
    "MgAl2O4": {"cr": "spinel"}, "Mg2SiO4": {"cr": "forsterite"}, "Cr2O3": {"I'": "eskolaite", "I": "eskolaite"},
    "Al(OH)3": {"a": "gibbsite"}, "SiC": {"b": "beta"}, "P": {"cr": "white"}, "S": {"a": "rhombic", "b": "monoclinic"},
    "CuO": {"cr": "tenorite"}, "Cu2O": {"cr": "cuprite"}, "Mg(OH)2": {"cr": "brucite"}, "Ca(OH)2": {"cr": "portlandite"},
    "ZrO2": {"III": "monoclinic", "II": "tetragonal", "I": "cubic"}, "BN": {"cr": "hexagonal"},
    "MgSiO3": {"I": "enstatite", "II": "protoenstatite", "III": "high"}, "SnO2": {"cr": "cassiterite"},
    "BaCO3": {"a": "witherite", "b": "hexagonal", "c": "cubic"}, "SrCO3": {"a": "strontianite", "b": "beta", "c": "cubic"},
    "NaCl": {"cr": "halite"}, "CaF2": {"a": "fluorite", "b": "beta"}, "CaSO4": {"II": "anhydrite", "I": "high"},
    "PbS": {"cr": "galena"}, "NiS": {"b": "millerite", "a": "alpha"}, "Ni3S2": {"a": "heazlewoodite", "b": "beta"},
    "Na3AlF6": {"a": "cryolite", "b": "beta"}, "BaSO4": {"a": "barite", "b": "high"}, "CuS": {"cr": "covellite"},
    "Cu2S": {"a": "chalcocite", "b": "beta", "c": "gamma"},
}
GENERIC = {"a": "alpha", "b": "beta", "c": "gamma", "d": "delta", "L": "liquid", "cr": "cr", "gr": "graphite"}

# Upper ends, K: where the record runs past melting, decomposition or boiling, or a liquid fit to 6000 K says nothing.
SOLID_CAP = {
    "MoO2": 2000, "WO2": 2000, "Fe2O3": 1735, "Mg3N2": 1800, "ZnSO4": 1200, "C": 4000, "TiB": 2500, "Si3N4": 2200,
    "Al2SiO5": 2000, "NaAlO2": 1923, "FeSO4": 1200, "Fe2(SO4)3": 1200, "Fe(OH)2": 800, "Fe(OH)3": 700, "CuSO4": 1200,
    "NH4Cl": 800, "CrN": 2000, "TiCl2": 1600, "VN": 2600, "FeS2": 1100, "Mg(OH)2": 900, "CuO": 1400, "WC": 2500, "W": 3500,
}
LIQUID_CAP = {
    "H2SO4": 650, "H3BO3": 600, "HBO2": 1200, "Fe(CO)5": 500, "TiCl4": 700, "SnCl4": 600, "H3PO4": 700, "P": 1000, "S": 1000,
    "Zn": 1400, "Cd": 1200, "Mg": 1600, "Na": 1400, "K": 1200, "Ca": 2000, "Sr": 1800, "Li": 1800, "Pb": 2200, "Ba": 2300,
    "AlCl3": 600, "FeCl3": 700, "FeCl2": 1400, "WCl6": 700, "P4O10": 900, "KNO3": 900, "NaNO3": 900, "LiNO3": 900, "SnCl2": 1000,
    "NaCN": 1500, "KCN": 1500, "H2O": 600, "SnS": 1600, "PbCl2": 1300, "K2S": 1600, "SiS2": 1800, "SiS": 1600,
    "NaOH": 1700, "KOH": 1700, "LiOH": 1700, "Ba(OH)2": 1300, "Sr(OH)2": 1100, "Ca(OH)2": 1200, "Cu2S": 1900, "LiH": 1300,
    "CaCO3": 1700, "MgCO3": 1300, "MgSO4": 1600, "CaSO4": 1900, "Na2SO3": 1400, "B2O3": 2400, "CuF2": 1600, "MoO3": 1500,
}


def tidy(name):
    """Formula in the usual writing, and the label in the brackets behind it."""
    name = name.split(",")[0] if not name.startswith("(") and "(" not in name else name
    label = ""
    if name.endswith(")") and not name[-2].isdigit():
        head, tail = name.rsplit("(", 1)
        if tail[:-1] not in ("OH",) and head and not head.endswith("("):
            name, label = head, tail[:-1]
    name = name.replace("AL", "Al").replace("CL", "Cl").replace("Fe.947O", "Fe0.947O")
    name = {"SH": "HS", "(WO3)2": "W2O6", "(WO3)3": "W3O9", "(WO3)4": "W4O12", "HAlO": "HAlO"}.get(name, name)
    return name, label


def part(entry, low, high, times, shift):
    """Spans of an entry between two temperatures; `times` scales to another formula unit, `shift` moves H, J/mol."""
    spans = []
    for it in entry.intervals:
        lo, hi = max(low, it.low), min(high, it.high)
        if hi - lo < 1e-6:
            continue
        if it.exponents[-1] == 0.0:
            exponents = it.exponents[:-1]
        else:
            exponents = it.exponents
        k = mpf(R) * times
        terms = [(int(e) if e == int(e) else e, k * mpf(c)) for e, c in zip(exponents, it.coefficients)]
        raw = Span(lo, hi, terms, k * mpf(it.b1) + shift, k * mpf(it.b2))
        at = T0 if lo <= T0 <= hi else lo
        spans.append(span(lo, hi, terms, at, raw.H(at), raw.S(at)))
    return spans


def gases(entries):
    """Gas sets by formula: (record phases, entry)."""
    wanted, made = dict.fromkeys(GASES), {}
    for entry in entries:
        if entry.condensed or entry.name not in wanted or not entry.intervals:
            continue
        formula, _ = tidy(entry.name)
        if counts(formula) != entry.elements:
            raise ValueError(f"{entry.name}: {formula} against {entry.elements}")
        # FeCl3(g): the heat of formation went through the calorie-to-joule factor twice
        shift = mpf(805972) if entry.name == "FeCL3" else 0
        made[formula] = (entry, [Phase("gas", "g", part(entry, 200, 4000, 1, shift))])
        wanted.pop(entry.name)
    if wanted:
        raise ValueError(f"gases not found: {' '.join(wanted)}")
    return made


def condensed(entries, elements):
    """Condensed sets by formula: (first entry, phases)."""
    made = {}
    for entry in entries:
        if not entry.condensed or not set(entry.elements) <= elements or not entry.intervals:
            continue
        formula, label = tidy(entry.name)
        if entry.name.rsplit("(", 1)[0] in SKIP:
            continue
        times = 1
        if formula == "Fe0.947O":
            entry.elements = {"Fe": 0.947, "O": 1.0}
        if counts(formula) != entry.elements:
            raise ValueError(f"{entry.name}: {formula} against {entry.elements}")
        if formula == "V2O4":
            formula, times = "VO2", mpf("0.5")
        liquid = label == "L"
        name = PHASES.get(formula, {}).get(label) or GENERIC.get(label) or label.replace("'", "-high").replace(",", "-")
        low, high = entry.intervals[0].low, entry.intervals[-1].high
        # below 298 K the lambda peak of NaCN runs to 530 J/K per mole of atoms
        low = max(low, T0 if formula == "NaCN" else 200)
        if high <= low:
            continue
        first = made.setdefault(formula, (entry, []))
        phases = first[1]
        if entry.name == "ALN(L)":
            # the record called liquid holds the solid from 1800 to 2700 K and the melt above
            phases[-1].spans += part(entry, 1800, 2700, 1, 0)
            continue
        if formula == "SrCl2" and label == "b":
            low = 990
        if formula == "Mg(OH)2" and liquid:
            continue
        if phases and abs(phases[-1].high - low) <= 2.5:
            low = phases[-1].high if phases[-1].high >= low else low
        if liquid:
            melt = low
            high = min(high, LIQUID_CAP.get(formula, 3500 if len(entry.elements) == 1 or melt > 1900 else melt + 700))
            high = min(high, max(3500, melt + 300))
        else:
            high = min(high, SOLID_CAP.get(formula, high))
        if high - low < 1:
            continue
        spans = part(entry, low, high, times, 0)
        if not spans:
            continue
        if spans[0].low > low:
            # undercooled by a kelvin or two to meet the phase before
            spans[0].low = low
        if phases and not liquid:
            last, ahead = phases[-1].spans[-1], spans[0]
            dh = ahead.H(ahead.low) - last.H(last.high)
            if abs(last.high - ahead.low) < 1e-9 and abs(dh) < 100:
                # a lambda or Curie point: one phase, the next span
                phases[-1].spans += spans
                continue
        if any(p.name == name for p in phases):
            name += "-high"
        phases.append(Phase(name, "l" if liquid else "s", spans))
    return made
