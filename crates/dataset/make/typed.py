"""Records that do not come from the NASA file: JANAF fits and values typed from the literature, and the
choice between records of one substance."""

from mpmath import mpf

import doubt
import janaf_fit
from form import T0, Phase, Record, Span, span

US = "work of the United States Government, free of copyright there"
FACTS = "published figures, typed from the paper with citation"
SOURCES = {
    "NASA-Glenn-2002": (
        "NASA Glenn 2002",
        "McBride, B. J.; Zehe, M. J.; Gordon, S. (2002). NASA Glenn Coefficients for Calculating Thermodynamic Properties of "
        "Individual Species. NASA/TP-2002-211556.",
        US,
    ),
    "JANAF-1998": (
        "NIST-JANAF 1998",
        "Chase, M. W. (1998). NIST-JANAF Thermochemical Tables, 4th ed. J. Phys. Chem. Ref. Data, Monograph 9.",
        "coefficients fitted here to the tables; the tables (NIST Standard Reference Database 13) are not contained",
    ),
}
NOT_FROM_NASA = set()
PREFERRED = {}


def usual_reason(record):
    return "the only set here"


def nasa_record(formula, gas, entry, phases):
    probe = Record("NASA-Glenn-2002", 0, 0, 0, 0, "-", "-", phases)
    t = T0 if any(p.holds(T0) for p in phases) else phases[0].low
    value = probe.values(t)
    anchored = t == T0
    h298, s298 = value.H(t) / 1000, value.S(t)
    uh, us, why = doubt.of(formula, gas, h298, s298, entry.code)
    made = f"coefficients times R = 8.314510; reference there: {origin(entry.code)}"
    return Record("NASA-Glenn-2002", h298, uh, s298, us, made, why, phases, anchored=anchored)


def origin(code):
    code = code.strip()
    for start, words in (
        ("tpis", "Gurvich et al., 19"), ("coda", "CODATA 19"), ("srd", "Alcock et al., 19"), ("bar", "Barin, 19"), ("j", "JANAF, "),
        ("g", "Glenn, "), ("n", "TRC, "),
    ):
        if code.startswith(start):
            return words + code[len(start) :].strip()
    return code


def records(book):
    return []
