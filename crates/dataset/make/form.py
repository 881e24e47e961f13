"""The records of the data file, their evaluation and the text they are written as.

Heat capacity is a sum of powers, Cp = sum c T^e. With it H = h + sum c T^(e+1)/(e+1) (e = -1: c ln T) and
S = s + sum c T^e/e (e = 0: c ln T), in J and J/K per mole. Logarithms go through mpmath, so that the last
written digit does not depend on the C library of the machine.
"""

import re
from dataclasses import dataclass, field

from mpmath import mp, mpf

mp.dps = 40
T0 = 298.15
DIGITS = 10

ELEMENTS = (
    "H He Li Be B C N O F Ne Na Mg Al Si P S Cl Ar K Ca Sc Ti V Cr Mn Fe Co Ni Cu Zn Ga Ge As Se Br Kr Rb Sr Y "
    "Zr Nb Mo Tc Ru Rh Pd Ag Cd In Sn Sb Te I Xe Cs Ba La Ce Hf Ta W Re Os Ir Pt Au Hg Tl Pb Bi"
).split()


def digits(x, n=DIGITS):
    """A number with a fixed count of significant digits, shortest form."""
    text = mp.nstr(mpf(x), n, strip_zeros=True, min_fixed=-5, max_fixed=n)
    if "e" in text:
        mantissa, exponent = text.split("e")
        mantissa = mantissa.rstrip("0").rstrip(".") if "." in mantissa else mantissa
        return f"{mantissa}e{int(exponent)}"
    return text.rstrip("0").rstrip(".") if "." in text else text


def fixed(x):
    """A number to three places behind the point, shortest form; nothing left of it is 0."""
    text = f"{float(x):.3f}".rstrip("0").rstrip(".")
    return "0" if text in ("-0", "") else text


def rounded(x):
    """The value that the written digits stand for."""
    return mpf(digits(x))


def kelvin(x):
    return digits(x, 8)


def counts(formula):
    """Element counts of a formula with nested brackets and decimal subscripts."""

    def merge(into, part, times):
        for k, v in part.items():
            into[k] = into.get(k, 0) + v * times

    pieces = re.split(r"(?<![0-9])\.", formula)
    result = {}
    for piece in pieces:
        lead = re.match(r"^[0-9]+", piece)
        times = int(lead.group()) if lead else 1
        body = piece[lead.end() :] if lead else piece
        stack = [{}]
        tokens = re.findall(r"([A-Z][a-z]?|\(|\)|\[|\])([0-9]*\.?[0-9]*)", body)
        if "".join(a + b for a, b in tokens) != body:
            raise ValueError(f"formula {formula}")
        for token, n in tokens:
            n = float(n) if n else 1.0
            if token in "([":
                stack.append({})
            elif token in ")]":
                inner = stack.pop()
                merge(stack[-1], inner, n)
            else:
                if token not in ELEMENTS:
                    raise ValueError(f"element {token} in {formula}")
                merge(stack[-1], {token: n}, 1)
        merge(result, stack[0], times)
    return result


def atoms(formula):
    return sum(counts(formula).values())


def cp_of(terms, t):
    t = mpf(t)
    return sum(c * t ** mpf(e) for e, c in terms)


def h_of(terms, t):
    t = mpf(t)
    return sum(c * mp.log(t) if e == -1 else c * t ** mpf(e + 1) / mpf(e + 1) for e, c in terms)


def s_of(terms, t):
    t = mpf(t)
    return sum(c * mp.log(t) if e == 0 else c * t ** mpf(e) / mpf(e) for e, c in terms)


@dataclass
class Span:
    low: float
    high: float
    terms: list
    h: object = 0
    s: object = 0

    def H(self, t):
        return self.h + h_of(self.terms, t)

    def S(self, t):
        return self.s + s_of(self.terms, t)

    def Cp(self, t):
        return cp_of(self.terms, t)

    def G(self, t):
        return self.H(t) - mpf(t) * self.S(t)


def span(low, high, terms, at, H, S):
    """A span whose H and S at the temperature `at` are given; its coefficients are those that get written."""
    terms = [(e, rounded(c)) for e, c in terms if c != 0]
    made = Span(low, high, terms)
    made.h = rounded(mpf(H) - h_of(terms, at))
    made.s = rounded(mpf(S) - s_of(terms, at))
    return made


@dataclass
class Phase:
    name: str
    state: str
    spans: list
    beside: str = ""
    metastable: bool = False

    @property
    def low(self):
        return self.spans[0].low

    @property
    def high(self):
        return self.spans[-1].high

    def at(self, t):
        for part in self.spans:
            if part.low - 1e-9 <= t <= part.high + 1e-9:
                return part
        raise ValueError(f"{self.name}: {t} K outside {self.low} to {self.high} K")

    def holds(self, t):
        return self.low - 1e-9 <= t <= self.high + 1e-9


@dataclass
class Record:
    """One `set` of the file: phases that share an anchor."""

    source: str
    h298: object  # kJ/mol
    u_h: float
    s298: object
    u_s: float
    made: str
    doubt: str
    phases: list
    preferred: bool = False
    why: str = ""
    anchored: bool = True

    @property
    def gas(self):
        return self.phases[0].state == "g"

    def values(self, t):
        """The stable phase at a temperature: the one with the lowest G among those that hold it."""
        holding = [p for p in self.phases if p.holds(t) and not p.metastable and not p.beside]
        if not holding:
            raise ValueError(f"no phase at {t} K")
        return min((p.at(t) for p in holding), key=lambda s: s.G(t))


@dataclass
class Substance:
    formula: str
    name: str = ""
    records: list = field(default_factory=list)

    def best(self, gas):
        for record in self.records:
            if record.gas == gas and record.preferred:
                return record
        return None


def write(version, sources, substances):
    out = ["leeway-data 1", f"version {version}", "# Made by make/make.py; do not edit by hand.", ""]
    for key, (short, cite, licence) in sources.items():
        out += [f"source {key}", f"  short {short}", f"  cite {cite}", f"  licence {licence}"]
    for substance in substances:
        out += ["", f"substance {substance.formula}", f"  name {substance.name}"]
        for r in substance.records:
            out.append(f"  set {r.source}" + (" preferred" if r.preferred else ""))
            if r.why:
                out.append(f"    why {r.why}")
            out.append(f"    made {r.made}")
            out.append(f"    H298 {fixed(r.h298)} u {digits(r.u_h, 4)}")
            out.append(f"    S298 {fixed(r.s298)} u {digits(r.u_s, 4)}")
            out.append(f"    doubt {r.doubt}")
            if not r.anchored:
                out.append("    anchor none")
            for p in r.phases:
                more = f" beside {p.beside}" if p.beside else " metastable" if p.metastable else ""
                out.append(f"    phase {p.name} {p.state} {kelvin(p.low)} {kelvin(p.high)}{more}")
                for x in p.spans:
                    terms = " ".join(f"{digits(e)}:{digits(c)}" for e, c in x.terms)
                    out.append(f"      span {kelvin(x.low)} {kelvin(x.high)} h {digits(x.h)} s {digits(x.s)} cp {terms}")
    return "\n".join(out) + "\n"


# Heat capacity per mole of atoms above which a record is not believed; the records with a measured peak may go higher.
CP_PER_ATOM, CP_AT_PEAK = 60, 100
PEAKS = {"Fe": "Curie point, 1042 K", "K2S": "1050 K", "Na2S": "1276 K", "SrCl2": "990 K", "Fe3O4": "848 K", "Fe2O3": "955 K", "MgFe2O4": "665 K"}


def check(sources, substances):
    """The checks that loading makes, and a few more; returns what is wrong, one line each."""
    wrong = []
    seen = set()
    for sub in substances:
        f = sub.formula
        if f in seen:
            wrong.append(f"{f}: listed twice")
        seen.add(f)
        n = atoms(f)
        for gas in (True, False):
            of = [r for r in sub.records if r.gas == gas]
            if of and sum(r.preferred for r in of) != 1:
                wrong.append(f"{f}: not exactly one preferred {'gas' if gas else 'condensed'} set")
        for r in sub.records:
            tag = f"{f} {r.source}"
            if r.source not in sources:
                wrong.append(f"{tag}: source not listed")
            if r.preferred and not r.why:
                wrong.append(f"{tag}: preferred without a reason")
            if not r.made or not r.doubt:
                wrong.append(f"{tag}: made or doubt missing")
            if len({p.state == "g" for p in r.phases}) != 1:
                wrong.append(f"{tag}: gas beside condensed phases")
            if r.anchored:
                try:
                    v = r.values(T0)
                    dh, ds = float(v.H(T0)) - float(r.h298) * 1e3, float(v.S(T0)) - float(r.s298)
                    if abs(dh) > 20 or abs(ds) > 0.05:
                        wrong.append(f"{tag}: spans miss H298 by {dh:.1f} J, S298 by {ds:.3f} J/K")
                except ValueError as e:
                    wrong.append(f"{tag}: {e}")
            for p in r.phases:
                for a, b in zip(p.spans, p.spans[1:]):
                    if abs(a.high - b.low) > 1e-9:
                        wrong.append(f"{tag} {p.name}: spans part at {a.high} K")
                        continue
                    dg, dh = float(b.G(b.low) - a.G(b.low)), float(b.H(b.low) - a.H(b.low))
                    if abs(dg) > 100 or abs(dh) > 100:
                        wrong.append(f"{tag} {p.name}: step of {dg:.1f} J in G, {dh:.1f} J in H at {b.low} K")
                for x in p.spans:
                    if not x.high > x.low:
                        wrong.append(f"{tag} {p.name}: span does not ascend at {x.low} K")
                    steps = [x.low + (x.high - x.low) * k / 20 for k in range(21)]
                    for t in steps:
                        cp = float(x.Cp(t))
                        if not 0 < cp < (CP_AT_PEAK if f in PEAKS else CP_PER_ATOM) * n:
                            wrong.append(f"{tag} {p.name}: Cp {cp:.1f} at {t:.1f} K")
                            break
            plain = [p for p in r.phases if not p.beside and not p.metastable]
            for a, b in zip(plain, plain[1:]):
                if b.low < a.high - 1e-9:
                    wrong.append(f"{tag}: {a.name} and {b.name} overlap")
                elif b.low > a.high + 1e-9:
                    wrong.append(f"{tag}: gap between {a.name} and {b.name}")
                else:
                    dg = float(b.at(b.low).G(b.low) - a.at(a.high).G(a.high))
                    ds = float(b.at(b.low).S(b.low) - a.at(a.high).S(a.high))
                    if abs(dg) > 100:
                        wrong.append(f"{tag}: step of {dg:.1f} J in G from {a.name} to {b.name}")
                    if ds < -0.05:
                        wrong.append(f"{tag}: S falls by {-ds:.2f} J/K from {a.name} to {b.name}")
    return wrong
