"""Reads NIST-JANAF tables (package janaf) and fits heat capacities to them.

Only fitted coefficients leave this module; the tables themselves stay in the package. Every fit is anchored:
H298 and S298 are the table's, and the coefficients are found by least squares on the enthalpy increments,
entropies and heat capacities together, in 40-digit arithmetic (mpmath), so that the result is the same on
every machine.
"""

import json
import re
from functools import cache
from importlib import resources

from mpmath import log, lu_solve, matrix, mpf

from form import T0, Phase, Span, counts, rounded, span

# A table is left out where its own columns disagree beyond a slip of one digit.
BAD_TABLES = {
    "B-049", "H-007", "H-046", "H-079", "O-011", "Cl-159", "Al-030",
}


@cache
def index():
    """Table number to (formula in the tables' order, name, phase)."""
    book = json.loads(resources.files("janaf").joinpath("janaf.json").read_text("utf-8"))
    found = {}
    for text, number in zip(book["display"], book["index"]):
        m = re.match(r"^([^,]+), (.+) \(([^)]+)\)$", text)
        if m:
            found[number] = m.groups()
    return found


@cache
def rows(number):
    """Rows (T, Cp, S, H-H298 in kJ, dfH in kJ or None) of a table, notes dropped; dfH is of the formation column."""
    text = resources.files("janaf").joinpath(f"data/{number}.txt").read_text("utf-8")
    out = []
    for line in text.split("\n")[2:]:
        cells = [c.strip() for c in line.split("\t")]
        if len(cells) < 5 or not re.match(r"^[0-9.]+$", cells[0]):
            continue

        def value(k):
            try:
                return float(cells[k])
            except (ValueError, IndexError):
                return None

        out.append((float(cells[0]), value(1), value(2), value(4), value(5)))
    return out


def anchor(number):
    """(dfH298 in kJ, S298) of a table."""
    for t, _, s, h, dfh in rows(number):
        if abs(t - T0) < 1e-6:
            return dfh, s
    raise ValueError(f"{number}: no row at 298.15 K")


@cache
def by_counts():
    """(element counts, phase class) to table numbers."""
    found = {}
    for number, (formula, _, phase) in index().items():
        try:
            key = tuple(sorted(counts(formula).items()))
        except ValueError:
            continue
        found.setdefault((key, phase == "g"), []).append(number)
    return found


def spread(formula, gas, near=None):
    """(dfH298, S298, table) of the tables for a formula: the lowest dfH298 among its condensed tables, for a gas
    the one nearest to `near`, since isomers share a formula."""
    key = (tuple(sorted(counts(formula).items())), gas)
    best = None
    for number in by_counts().get(key, []):
        if number in BAD_TABLES or "Ion" in index()[number][1]:
            continue
        if not gas and index()[number][2] not in ("cr", "cr,l", "l"):
            continue
        try:
            h, s = anchor(number)
        except ValueError:
            continue
        if h is None or s is None:
            continue
        if best is None or (abs(h - near) < abs(best[0] - near) if gas and near is not None else h < best[0]):
            best = (h, s, number)
    return best


def pieces(number, low, high):
    """Rows between two temperatures, cut where the table lists a temperature twice."""
    taken = [r for r in rows(number) if low - 1e-6 <= r[0] <= high + 1e-6 and None not in r[:4]]
    parts, current = [], []
    for row in taken:
        if current and abs(current[-1][0] - row[0]) < 1e-6:
            if current[-1][1:4] != row[1:4]:
                parts.append(current)
                current = [row]
            continue
        current.append(row)
    if len(current) > 1:
        parts.append(current)
    return [p for p in parts if len(p) > 1]


def solve(points, exponents, t_ref, h_ref, s_ref):
    """Coefficients by least squares; each row speaks through H/T, S and a third of Cp."""
    n = len(exponents)
    normal, right = matrix(n, n), matrix(n, 1)

    def add(line, value, weight):
        for i in range(n):
            for j in range(n):
                normal[i, j] += weight * line[i] * line[j]
            right[i] += weight * line[i] * value

    # temperatures in kilokelvin, so that the normal equations are well scaled
    for t, cp, s, h, _ in points:
        x, x0 = mpf(t) / 1000, mpf(t_ref) / 1000
        if cp is not None:
            add([x**e for e in map(mpf, exponents)], mpf(cp), mpf(1) / 9)
        if abs(t - t_ref) < 1e-6:
            continue
        add(
            [(log(x / x0) if e == -1 else (x ** mpf(e + 1) - x0 ** mpf(e + 1)) / mpf(e + 1)) / x for e in exponents],
            (mpf(h) - mpf(h_ref)) / x,
            mpf(4),
        )
        add(
            [log(x / x0) if e == 0 else (x ** mpf(e) - x0 ** mpf(e)) / mpf(e) for e in exponents],
            mpf(s) - mpf(s_ref),
            mpf(4),
        )
    solution = lu_solve(normal, right)
    return [(e, solution[i] / mpf(1000) ** mpf(e)) for i, e in enumerate(exponents)]


def exponents_for(points):
    n = len(points)
    if all(abs(p[1] - points[0][1]) < 2e-3 for p in points):
        return [0]
    for count, choice in ((8, [-2, -1, 0, 1, 2, 3]), (5, [-2, -1, 0, 1, 2]), (4, [-2, 0, 1, 2]), (3, [0, 1, 2]), (2, [0, 1])):
        if n >= count:
            return choice
    return [0]


def fit(number, low, high, h298=None, s298=None, cuts=()):
    """Spans fitted to one table between two temperatures, and the largest misfit of G, kJ/mol.

    `cuts` are temperatures where a smooth table is split all the same, because one polynomial cannot follow it.
    """
    h0, s0 = anchor(number)
    h298 = h0 if h298 is None else h298
    s298 = s0 if s298 is None else s298
    spans, worst = [], mpf(0)
    parts, before = [], None
    for points in pieces(number, low, high):
        edges = [c for c in cuts if points[0][0] < c < points[-1][0]]
        for a, b in zip([points[0][0], *edges], [*edges, points[-1][0]]):
            parts.append([p for p in points if a - 1e-6 <= p[0] <= b + 1e-6])
    for points in parts:
        lo, hi = points[0][0], points[-1][0]
        inside = next((p for p in points if abs(p[0] - T0) < 1e-6), points[0])
        t_ref, _, s_ref, h_ref, _ = inside
        terms = solve(points, exponents_for(points), t_ref, h_ref, s_ref)
        if spans and abs(spans[-1].high - lo) < 1e-6:
            # start where the span before ends, plus the step that the table shows there
            t_ref, last = lo, spans[-1]
            H = last.H(lo) + (mpf(points[0][3]) - mpf(before[3])) * 1000
            S = last.S(lo) + (mpf(points[0][2]) - mpf(before[2]))
        else:
            H, S = mpf(h298) * 1000 + mpf(h_ref) * 1000, mpf(s298) + mpf(s_ref) - mpf(s0)
        made = span(lo, hi, terms, t_ref, H, S)
        for t, _, s, h, _ in points:
            stated = mpf(h298) * 1000 + mpf(h) * 1000 - mpf(t) * (mpf(s) + mpf(s298) - mpf(s0))
            worst = max(worst, abs(made.G(t) - stated) / 1000)
        spans.append(made)
        before = points[-1]
    return spans, worst


def _jump(number, t):
    """Whether a table shows a first-order step at a temperature."""
    at = [r for r in rows(number) if abs(r[0] - t) < 1e-6 and r[3] is not None]
    return len(at) > 1 and abs(at[0][3] - at[-1][3]) > 0.1
