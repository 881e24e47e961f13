"""Ways to make a record: from heat-capacity equations, from a lambda or Landau term, from a measured oxygen
potential combined with records already here, from any function of G."""

from mpmath import diff, exp, log, lu_solve, matrix, mpf, sqrt

import janaf_fit
from form import T0, Phase, Record, Span, cp_of, h_of, s_of, span

R = mpf("8.314462618")


def chain(H298, S298, steps):
    """Phases from 298.15 K up: steps are (name, state, low, high, terms, dH of transition into this step in J).

    Steps of the same name are spans of one phase. H298 in kJ.
    """
    phases, H, S = [], mpf(str(H298)) * 1000, mpf(str(S298))
    t = steps[0][2]
    for name, state, low, high, terms, dh in steps:
        if low != t:
            raise ValueError(f"{name}: starts at {low}, not {t}")
        H += mpf(dh)
        S += mpf(dh) / mpf(low)
        made = span(low, high, terms, low, H, S)
        H, S, t = made.H(high), made.S(high), high
        if phases and phases[-1].name == name:
            phases[-1].spans.append(made)
        else:
            phases.append(Phase(name, state, [made]))
    return phases


def below(phase, low, terms):
    """A span put below a phase, with H and S continuous at the join."""
    first = phase.spans[0]
    made = span(low, first.low, terms, first.low, first.H(first.low), first.S(first.low))
    phase.spans.insert(0, made)


def above(phase, high, terms):
    last = phase.spans[-1]
    phase.spans.append(span(last.high, high, terms, last.high, last.H(last.high), last.S(last.high)))


def hp(a, b, c, d):
    """Cp terms of Holland and Powell, their units kJ and 1e-5 kJ/K2, as J."""
    return [(0, mpf(str(a)) * 1000), (1, mpf(str(b)) / 100), (-2, mpf(str(c)) * 1000), (-0.5, mpf(str(d)) * 1000)]


def berman(k0, k1, k2, k3):
    return [(0, mpf(str(k0))), (-0.5, mpf(str(k1))), (-2, mpf(str(k2))), (-3, mpf(str(k3)))]


def berman_lambda(l1, l2):
    """Cp of Berman's lambda term, T (l1 + l2 T)^2, as powers."""
    l1, l2 = mpf(str(l1)), mpf(str(l2))
    return [(1, l1 * l1), (2, 2 * l1 * l2), (3, l2 * l2)]


def add(*lists):
    total = {}
    for terms in lists:
        for e, c in terms:
            total[e] = total.get(e, mpf(0)) + c
    return sorted(total.items())


def times(terms, k):
    return [(e, mpf(k) * c) for e, c in terms]


def fit_g(G, low, high, exponents, n=48):
    """One span whose G follows a function of T by least squares; also the largest misfit, J/mol."""
    m = len(exponents) + 2
    normal, right = matrix(m, m), matrix(m, 1)
    steps = [mpf(low) + (mpf(high) - mpf(low)) * k / n for k in range(n + 1)]
    for t in steps:
        x = t / 1000
        line = [mpf(1), x]
        for e in exponents:
            # G of c x^e: H - T S with H = x^(e+1)/(e+1), S = x^e/e
            H = log(x) if e == -1 else x ** mpf(e + 1) / mpf(e + 1)
            S = log(x) if e == 0 else x ** mpf(e) / mpf(e)
            line.append(H - x * S)
        g = G(t) / 1000
        for i in range(m):
            for j in range(m):
                normal[i, j] += line[i] * line[j]
            right[i] += line[i] * g
    sol = lu_solve(normal, right)
    # sol is in kJ and kilokelvin; c T^e with T in K
    terms = [(e, sol[i + 2] / mpf(1000) ** mpf(e)) for i, e in enumerate(exponents)]
    mid = (mpf(low) + mpf(high)) / 2
    raw = Span(low, high, terms)
    x = mid / 1000
    H = sol[0] * 1000 + sum(
        sol[i + 2] * (log(x) if e == -1 else x ** mpf(e + 1) / mpf(e + 1)) for i, e in enumerate(exponents)
    ) * 1000
    S = -sol[1] + sum(sol[i + 2] * (log(x) if e == 0 else x ** mpf(e) / mpf(e)) for i, e in enumerate(exponents))
    made = span(low, high, terms, mid, H, S)
    worst = max(abs(made.G(t) - G(t)) for t in steps)
    return made, worst


def fit_h(H, S, Cp, low, high, exponents, n=40, cp_to=None):
    """One span fitted to H and S functions (and Cp up to cp_to), exact at its lower end; largest misfit of G, J/mol."""
    steps = [mpf(low) + (mpf(high) - mpf(low)) * k / n for k in range(n + 1)]
    points = [(t, Cp(t) if cp_to is None or t <= cp_to else None, S(t), (H(t) - H(steps[0])) / 1000, None) for t in steps]
    terms = janaf_fit.solve(points, exponents, steps[0], mpf(0), S(steps[0]))
    made = span(low, high, terms, low, H(steps[0]), S(steps[0]))
    worst = max(abs(made.G(t) - (H(t) - t * S(t))) for t in steps)
    return made, worst


def landau(H298, S298, terms, Tc, Smax, high, name, cut):
    """Phases of a Holland-Powell record with a Landau term (tricritical, 1 bar), refitted in three spans up to Tc.

    Returns the phase and the largest misfit of G below Tc, J/mol.
    """
    Tc, Smax, t0 = mpf(str(Tc)), mpf(str(Smax)), mpf(str(T0))
    Q0 = (1 - t0 / Tc) ** mpf("0.25")
    base = Span(T0, high, terms)
    base.h = mpf(str(H298)) * 1000 - h_of(terms, T0)
    base.s = mpf(str(S298)) - s_of(terms, T0)

    def order(t):
        return (1 - t / Tc) ** mpf("0.25") if t < Tc else mpf(0)

    def S(t):
        return base.S(t) + Smax * (Q0**2 - order(t) ** 2)

    def H(t):
        Q = order(t)
        return base.H(t) + Smax * Tc * (Q0**2 - Q0**6 / 3 - Q**2 + Q**6 / 3)

    def Cp(t):
        Q = order(t)
        return base.Cp(t) + (Smax * t / (2 * Tc * Q**2) if Q > 0 else 0)

    one, worst = fit_h(H, S, Cp, T0, cut, [-2, -1, 0, 1, 2, 3])
    spans = [one]
    for lo, hi in ((cut, float(Tc) - 25), (float(Tc) - 25, float(Tc))):
        # a straight line of Cp that gives H and S at the upper end exactly
        last = spans[-1]
        dH, dS = H(mpf(hi)) - last.H(lo), S(mpf(hi)) - last.S(lo)
        lo_, hi_ = mpf(lo), mpf(hi)
        system = matrix([[hi_ - lo_, (hi_**2 - lo_**2) / 2], [log(hi_ / lo_), hi_ - lo_]])
        a, b = lu_solve(system, matrix([dH, dS]))
        made = span(lo, hi, [(0, a), (1, b)], lo, last.H(lo), last.S(lo))
        steps = [lo_ + (hi_ - lo_) * k / 20 for k in range(21)]
        worst = max(worst, max(abs(made.G(t) - (H(t) - t * S(t))) for t in steps))
        spans.append(made)
    last = spans[-1]
    spans.append(span(float(Tc), high, terms, float(Tc), last.H(Tc), last.S(Tc)))
    return Phase(name, "s", spans), worst


def magnetic(Tc, B, p):
    """Gibbs energy of magnetic ordering after Inden, Hillert and Jarl, J/mol."""
    Tc, B, p = mpf(str(Tc)), mpf(str(B)), mpf(str(p))
    A = mpf(518) / 1125 + mpf(11692) / 15975 * (1 / p - 1)

    def G(t):
        x = t / Tc
        if x <= 1:
            g = 1 - (79 / (140 * p * x) + mpf(474) / 497 * (1 / p - 1) * (x**3 / 6 + x**9 / 135 + x**15 / 600)) / A
        else:
            g = -(x**-5 / 10 + x**-15 / 315 + x**-25 / 1500) / A
        return R * t * log(B + 1) * g

    return G


def potential(a, b, c=0, d=0):
    """Chemical potential of oxygen a + b T + c T ln T + d T^2, J/mol O2 against 1 bar."""
    a, b, c, d = (mpf(str(x)) for x in (a, b, c, d))
    return lambda t: a + b * t + c * t * log(t) + d * t * t


def janaf_phases(number, low=200, high=6000, names=None, cuts=(), state=None, h298=None, s298=None):
    """Phases fitted to a table, cut at its first-order steps; and the largest misfit of G, kJ/mol."""
    spans, worst = janaf_fit.fit(number, low, high, cuts=cuts, h298=h298, s298=s298)
    kind = janaf_fit.index()[number][2]
    groups = []
    for s in spans:
        if groups and not janaf_fit._jump(number, s.low):
            groups[-1].append(s)
        else:
            groups.append([s])
    phases = []
    for k, group in enumerate(groups):
        liquid = state == "l" or kind == "l" or (kind == "cr,l" and len(groups) > 1 and k == len(groups) - 1)
        st = "g" if kind == "g" or kind == "ref" and state == "g" else "l" if liquid else "s"
        default = "gas" if st == "g" else "liquid" if liquid else ("cr" if len(groups) - (kind == "cr,l") <= 1 else f"cr{k + 1}")
        name = names[k] if names and k < len(names) else default
        phases.append(Phase(name, st, group))
    return phases, worst
