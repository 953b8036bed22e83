#!/usr/bin/env python3
"""Writes derived_<family>.toml: every formula at crooked numbers.

Needs mpmath (1.3.0 was used). Values are worked out with 50 digits and by
another road than the program's: kinematics in time instead of energy, a
linear solver instead of a solved formula, complex numbers instead of sines,
a forward impact in exact fractions read backward. Run it in this folder.
"""
from fractions import Fraction as Q
from mpmath import mp, mpf, mpc, atan, sin, cos, sqrt, matrix, lu_solve, exp, arg, fabs, re, im, nstr

mp.dps = 50
FILES = {
    "braking": "braking", "mass": "mass", "path": "path",
    "contact": "contact", "momentum": "momentum", "inline_impact": "in-line",
}
rows = {name: [] for name in FILES}


def num(x):
    """A Fraction or text as an mpf of the double that TOML will hold."""
    return mpf(float(x)) if not isinstance(x, mpf) else mpf(float(x))


def real(x):
    return mpf(x.numerator) / x.denominator if isinstance(x, Q) else mpf(x)


def printed(x):
    """Twelve significant digits, no exponent."""
    x = real(x)
    text = nstr(x, 12, min_fixed=-30, max_fixed=30, strip_zeros=False)
    return text


def row(family, formula, inputs, expected, how):
    inputs = [float(i) if not isinstance(i, Q) else i.numerator / i.denominator for i in inputs]
    rows[family].append((formula, inputs, printed(expected), how))


# -- braking ---------------------------------------------------------------
g = num("9.8123")
k, eta, mu, G = num("1.04"), num("0.73"), num("0.687"), num("-0.043")
theta = atan(G)
row("braking", "test-friction", [num("0.713"), num("0.061")],
    (num("0.713") - sin(atan(num("0.061")))) / cos(atan(num("0.061"))), "solved for mu with the angle itself")
row("braking", "level-drag", [k, eta, mu], k * eta * mu, "product, 50 digits")
row("braking", "grade-drag", [k, eta, mu, G], k * eta * mu * cos(theta) + sin(theta), "with the angle itself")
row("braking", "stated-drag", [k, mu], k * mu, "product, 50 digits")
row("braking", "stated-drag-on-grade", [k, mu, G], k * mu * cos(theta) + sin(theta), "with the angle itself")
f, d = num("0.587"), num("37.41")
t = sqrt(2 * d / (f * g))
row("braking", "stop-speed", [g, f, d], f * g * t, "kinematics: time to cover d from rest, reversed")
v1 = num("8.37")
a = f * g
t = (-v1 + sqrt(v1 * v1 + 2 * a * d)) / a
row("braking", "braked-speed", [v1, g, f, d], v1 + a * t, "kinematics: d = v1 t + a t^2/2 solved for t, then v1 + a t")

# -- mass, path --------------------------------------------------------------
row("mass", "loaded-mass", [num("1483.7"), num("91.3")], num("1483.7") + num("91.3"), "sum, 50 digits")
e1, n1, e2, n2 = map(num, ("12.345", "-7.891", "-31.07", "22.46"))
z = mpc(e2 - e1, n2 - n1)
row("path", "leg", [e1, n1, e2, n2], fabs(z), "modulus of a complex number")
row("path", "slope-length", [num("23.71"), num("-0.087")], num("23.71") / cos(atan(num("-0.087"))), "length over the cosine of the slope")
row("path", "course", [e1, n1, e2, n2], arg(z), "argument of a complex number")
row("path", "longer-path", [num("13.37"), num("0.083")], num("13.37") + num("0.083"), "sum, 50 digits")

# -- momentum ----------------------------------------------------------------
row("contact", "road-impulse", [num("-0.83"), mu, g, num("0.117")], -num("0.83") * mu * g * num("0.117") / 2, "50 digits")
v, c = num("13.71"), num("2.113")
z = v * exp(mpc(0, 1) * c)
row("momentum", "component-x", [v, c], re(z), "real part of v exp(i c)")
row("momentum", "component-y", [v, c], im(z), "imaginary part of v exp(i c)")
m1, m2 = num("1437.5"), num("1688.25")
p = [num(x) for x in ("6.31", "0.27", "-4.77", "-0.19")]
row("momentum", "momentum-sum", [m1, p[0], p[1], m2, p[2], p[3]], m1 * (p[0] - p[1]) + m2 * (p[2] - p[3]), "50 digits")
a1, a2 = num("0.217"), num("1.843")
unit = lambda a: exp(mpc(0, 1) * a)
cross = lambda x, y: im(x.conjugate() * y)
dot = lambda x, y: re(x.conjugate() * y)
row("momentum", "condition", [a1, a2], 1 / cross(unit(a1), unit(a2)), "cross product of unit vectors")
px, py = num("9731.5"), num("18877.25")
A = matrix([[m1 * cos(a1), m2 * cos(a2)], [m1 * sin(a1), m2 * sin(a2)]])
s = lu_solve(A, matrix([px, py]))
row("momentum", "approach-speed", [px, py, m1, a1, a2], s[0], "two linear equations, LU")
row("momentum", "approach-speed", [px, py, m2, a2, a1], s[1], "two linear equations, LU")
own, other, vo, vown = num("0.413"), num("2.207"), num("7.13"), num("16.83")
P = m1 * vown * unit(own) + m2 * vo * unit(other)
row("momentum", "approach-speed-known-partner", [re(P), im(P), m1, own, m2, vo, other], vown, "momentum made from the speed, read backward")
off = num("311.7")
Q_ = P + off * mpc(0, 1) * unit(own)
row("momentum", "momentum-across-known-partner", [re(Q_), im(Q_), own, m2, vo, other], off, "momentum made with a known part across, read backward")
P = m1 * vown * unit(own)
row("momentum", "approach-speed-standing-partner", [re(P), im(P), m1, own], vown, "momentum made from the speed, read backward")
row("momentum", "momentum-across", [px, py, own], im(mpc(px, py) / unit(own)), "imaginary part after turning the course to east")
row("contact", "velocity-change", [num("-3.17"), num("11.09")], num("-3.17") - num("11.09"), "difference, 50 digits")
dx, dy, psi = num("-7.13"), num("2.91"), num("0.377")
row("contact", "vector-size", [dx, dy], fabs(mpc(dx, dy)), "modulus of a complex number")
row("momentum", "force-direction", [dx, dy, psi], -arg(-mpc(dx, dy) / unit(psi)), "argument of -dV in the vehicle's axes, clockwise")
b = [num(x) for x in ("14.2", "1.3", "-2.7", "9.9")]
row("momentum", "closing-speed", b, fabs(mpc(b[0], b[1]) - mpc(b[2], b[3])), "modulus of a complex number")
w1, w2, u1, u2 = map(num, ("15.3", "4.1", "8.2", "9.7"))
row("momentum", "energy-lost", [m1, w1, u1, m2, w2, u2],
    (m1 * w1**2 + m2 * w2**2) / 2 - (m1 * u1**2 + m2 * u2**2) / 2, "energy before less energy after")
# An impact of two points along a crooked normal with e = 0.137.
n, e = unit(num("0.731")), num("0.137")
V1, V2 = mpc(b[0], b[1]), mpc(b[2], b[3])
close = dot(n, V1 - V2)
J = (1 + e) * close / (1 / m1 + 1 / m2)
W1, W2 = V1 - J / m1 * n, V2 + J / m2 * n
row("momentum", "implied-restitution", [re(V1), im(V1), re(V2), im(V2), re(W1), im(W1), re(W2), im(W2)], e,
    "impact of two points with e = 0.137, read backward")

# -- in-line, in exact fractions ----------------------------------------------
M1, M2, U1, U2, E = Q(14375, 10), Q(168825, 100), Q(163, 10), Q(-41, 10), Q(17, 100)
J = (1 + E) * (U1 - U2) / (1 / M1 + 1 / M2)
A1, A2 = U1 - J / M1, U2 + J / M2
LOSS = (M1 * U1**2 + M2 * U2**2 - M1 * A1**2 - M2 * A2**2) / 2
row("inline_impact", "reversed", [U2], -U2, "exact fraction")
row("contact", "road-taken-out", [Q(731, 100), Q(-19, 100)], Q(75, 10), "exact fraction")
row("inline_impact", "after-first", [M1, U1, M2, U2, E], A1, "impulse (1 + e) m_r V in fractions")
row("inline_impact", "after-second", [M1, U1, M2, U2, E], A2, "impulse (1 + e) m_r V in fractions")
row("inline_impact", "closing-from-separation", [A1, A2, E], U1 - U2, "forward impact read backward")
row("inline_impact", "closing-from-energy", [LOSS, M1, M2, E], U1 - U2, "forward impact read backward, energies summed")
row("inline_impact", "closing-from-delta-vs", [1, J / M1, 1, J / M2, E], U1 - U2, "forward impact read backward")
row("inline_impact", "delta-v-mismatch", [M1, Q(103, 100), Q(9, 1), M2, Q(97, 100), Q(7, 1)],
    M1 * Q(927, 100) - M2 * Q(679, 100), "exact fraction")
row("inline_impact", "separation-mismatch", [A1, A2 + Q(3, 10), E, U1 - U2], Q(3, 10), "forward impact with a known slip, read backward")
row("contact", "recorded-delta-v", [Q(103, 100), Q(91, 10)], Q(9373, 1000), "exact fraction")
row("inline_impact", "before-first", [M1, A1, M2, A2, U1 - U2], U1, "forward impact read backward")
row("inline_impact", "before-second", [M1, A1, M2, A2, U1 - U2], U2, "forward impact read backward")
row("inline_impact", "before-known-partner", [M1, A1, M2, A2, U2], U1, "forward impact read backward")
row("inline_impact", "restitution", [U1, U2, A1, A2], E, "forward impact read backward")
row("inline_impact", "absorbed-energy", [M1, M2, E, U1 - U2], LOSS, "energies before and after summed")
row("inline_impact", "closing-in-line", [U1, U2], U1 - U2, "exact fraction")

for family, method in FILES.items():
    with open(f"derived_{family}.toml", "w") as out:
        out.write("# Written by make_derived.py; do not edit. Twelve digits from 50-digit arithmetic.\n")
        out.write(f'method = "{method}"\n')
        for formula, inputs, value, how in rows[family]:
            out.write(f'\n[[row]]\nformula = "{formula}"\ninputs = {inputs!r}\nprinted = "{value}"\n')
            out.write(f'source = "make_derived.py: {how}"\nprovenance = "derived"\n')
