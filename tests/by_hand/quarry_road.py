"""The demo case worked by hand: cases/quarry-road.toml, entry by entry.

Plain arithmetic in 50 digits (mpmath), written from the mechanics and not from
the program: for the speeds before impact the sine form of the solution is
used, where the program uses components. Prints the table that
tests/by_hand.rs reads: title of the line = value in SI units (angles in rad).

    pip install mpmath && python3 tests/by_hand/quarry_road.py > tests/by_hand/quarry_road.toml
"""
from mpmath import mp, mpf, sqrt, sin, cos, atan2, pi

mp.dps = 50
M = mpf
g = M("9.80665")
P = {  # survey
    31: ("101.20", "201.10"), 32: ("102.67", "202.74"), 33: ("105.04", "205.02"),
    41: ("99.40", "200.30"), 42: ("100.94", "202.27"), 43: ("103.04", "205.07"), 44: ("106.54", "209.97"),
}
P = {k: (M(e), M(n)) for k, (e, n) in P.items()}
out = []


def line(title, value):
    out.append((title, value))
    return value


def dist(a, b):
    return sqrt((P[b][0] - P[a][0]) ** 2 + (P[b][1] - P[a][1]) ** 2)


def course(a, b):
    return atan2(P[b][1] - P[a][1], P[b][0] - P[a][0])


mu1 = sum(M(x) for x in "0.71 0.74 0.69 0.73 0.72 0.70 0.74 0.72".split()) / 8
mu2 = M("0.42")
# A to rest: 0.60..0.80 of the lane's friction
a1 = line("Distance from point 31 to point 32: A after impact", dist(31, 32))
a2 = line("Distance from point 32 to point 33: A after impact", dist(32, 33))
dA = line("Length of the path: A after impact", a1 + a2)
fA = line("Drag factor: A after impact", M("0.7") * mu1)
vA1 = line("Speed of A after impact", sqrt(2 * g * fA * dA))
# B to rest: lane, then verge uphill
p2 = line("Distance from point 43 to point 44: B after impact, stretch 2", dist(43, 44))
G = M("0.03")
theta = mp.atan(G)
d2 = line("Length along the slope: B after impact, stretch 2", p2 / cos(theta))
f2 = line("Drag factor: B after impact, stretch 2", M("0.9") * mu2 * cos(theta) + sin(theta))
vj = line("Speed at the start of: B after impact, stretch 2", sqrt(2 * g * f2 * d2))
b1 = line("Distance from point 41 to point 42: B after impact, stretch 1", dist(41, 42))
b2 = line("Distance from point 42 to point 43: B after impact, stretch 1", dist(42, 43))
d1 = line("Length of the path: B after impact, stretch 1", b1 + b2)
f1 = line("Drag factor: B after impact, stretch 1", M("0.8") * mu1)
vB1 = line("Speed of B after impact", sqrt(vj ** 2 + 2 * g * f1 * d1))
line("Length of all stretches so far: B after impact", d1 + d2)
line("Straight line from separation to rest: B after impact", dist(41, 44))
# masses, directions
mA = line("Mass of A in the crash", M(1480) + 75)
thA = line("Direction in which A left the impact", course(31, 32))
mB = line("Mass of B in the crash", M(1650) + 90)
thB = line("Direction in which B left the impact", course(41, 42))
alA, alB = pi / 2, M(0)  # bearings 0 and 90
for who in "AB":
    for way in ("eastward", "northward"):
        line(f"Velocity change of {who} by the road during contact, {way}", M(0))
xA = line("Velocity of A after impact, east component", vA1 * cos(thA))
yA = line("Velocity of A after impact, north component", vA1 * sin(thA))
xB = line("Velocity of B after impact, east component", vB1 * cos(thB))
yB = line("Velocity of B after impact, north component", vB1 * sin(thB))
line("Momentum of both before impact, east component", mA * xA + mB * xB)
line("Momentum of both before impact, north component", mA * yA + mB * yB)
line("Condition of the momentum solution", 1 / sin(alB - alA))
# sine form: v_1 = sum m_i v_i' sin(a_2 - th_i) / (m_1 sin(a_2 - a_1))
vA = line("Speed of A before impact",
          (mA * vA1 * sin(alB - thA) + mB * vB1 * sin(alB - thB)) / (mA * sin(alB - alA)))
vB = line("Speed of B before impact",
          (mA * vA1 * sin(alA - thA) + mB * vB1 * sin(alA - thB)) / (mB * sin(alA - alB)))
cx, cy = vA * cos(alA), vA * sin(alA)
ex, ey = vB * cos(alB), vB * sin(alB)
line("Velocity of A before impact, east component", cx)
line("Velocity of A before impact, north component", cy)
line("Velocity of B before impact, east component", ex)
line("Velocity of B before impact, north component", ey)
for who, (x1, y1, x0, y0, psi) in {"A": (xA, yA, cx, cy, alA), "B": (xB, yB, ex, ey, alB)}.items():
    dx = line(f"Delta-V of {who}, east component", x1 - x0)
    dy = line(f"Delta-V of {who}, north component", y1 - y0)
    line(f"Delta-V of {who}", sqrt(dx ** 2 + dy ** 2))
    # direction of -dV against the heading, clockwise
    p = psi - atan2(-dy, -dx)
    while p > pi:
        p -= 2 * pi
    while p <= -pi:
        p += 2 * pi
    line(f"Principal direction of force on {who}", p)
line("Closing speed", sqrt(vA ** 2 + vB ** 2 - 2 * vA * vB * cos(alB - alA)))
line("Energy lost in the impact", (mA * vA ** 2 + mB * vB ** 2 - mA * vA1 ** 2 - mB * vB1 ** 2) / 2)
# restitution along the impulse: unit vector along B's delta-V
dx, dy = xB - ex, yB - ey
s = sqrt(dx ** 2 + dy ** 2)
nx, ny = dx / s, dy / s
line("Restitution implied, centres of gravity along the line of the impulse",
     ((xB - xA) * nx + (yB - yA) * ny) / ((cx - ex) * nx + (cy - ey) * ny))
G = M("0.015")
theta = mp.atan(G)
fs = line("Drag factor: A's marks", mu1 * cos(theta) + sin(theta))
line("Speed of A at the start of its marks", sqrt(vA ** 2 + 2 * g * fs * M("12.4")))

for title, value in out:
    number = mp.nstr(value, 15, strip_zeros=False) if abs(value) > M("1e-40") else "0.0"
    print(f'"{title}" = {number}')
