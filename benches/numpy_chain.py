#!/usr/bin/env python3
"""The chain of cases/quarry-road.toml, vectorised by hand with NumPy.

Same inputs, same lines, same checks as the plan that retrodict makes of the
case, written as one would write a script for this one crash. Prints one JSON
object: trials a second for several batch sizes (draws alone and whole chain),
and mean and standard error of each result. Run by benches/trials.rs, which
compares speed and means.
"""

import json
import os
import sys
import time

# One core: NumPy's element-wise loops use no threads, a linear algebra
# library behind it might start some.
for name in ("OMP_NUM_THREADS", "OPENBLAS_NUM_THREADS", "MKL_NUM_THREADS"):
    os.environ.setdefault(name, "1")

import numpy as np  # noqa: E402  (after the environment)

G = 9.80665
Z95 = 1.959963984540054  # half-width of the central 95 % in standard deviations
DEG = np.pi / 180.0

# Inputs: name, mean, standard deviation.
NORMALS = [
    # Surveyed points, 0.05 m each.
    ("e31", 101.20, 0.05), ("n31", 201.10, 0.05),
    ("e32", 102.67, 0.05), ("n32", 202.74, 0.05),
    ("e33", 105.04, 0.05), ("n33", 205.02, 0.05),
    ("e41", 99.40, 0.05), ("n41", 200.30, 0.05),
    ("e42", 100.94, 0.05), ("n42", 202.27, 0.05),
    ("e43", 103.04, 0.05), ("n43", 205.07, 0.05),
    ("e44", 106.54, 0.05), ("n44", 209.97, 0.05),
    # Verge: friction and grade; grade and length of A's marks.
    ("mu_f2", 0.42, 0.08 / Z95), ("grade_b2", 0.03, 0.01 / Z95),
    ("grade_a", 0.015, 0.003 / Z95), ("marks_a", 12.4, 0.3 / Z95),
    # Loads and approach courses (bearing 0 is north, counted here from east).
    ("load_a", 75.0, 10.0 / Z95), ("load_b", 90.0, 15.0 / Z95),
    ("alpha_a", 90.0 * DEG, 2.0 * DEG / Z95), ("alpha_b", 0.0, 3.0 * DEG / Z95),
    # Method errors: drag after impact, the road's impulse.
    ("k_f1", 1.0, 0.10), ("k_f2", 1.0, 0.10),
    ("z_ax", 0.0, 1.0), ("z_bx", 0.0, 1.0), ("z_ay", 0.0, 1.0), ("z_by", 0.0, 1.0),
]
# Inputs: name, lower limit, upper limit.
RECTANGULARS = [
    ("share_a", 0.60, 0.80), ("share_b1", 0.70, 0.90), ("share_b2", 0.80, 1.00),
    ("vehicle_a", 1465.0, 1495.0), ("vehicle_b", 1610.0, 1690.0), ("tau", 0.03, 0.17),
]
# Friction of the lane: mean of eight stops, with the scatter that the program
# takes at least for one vehicle here, seven degrees of freedom.
MU_F1 = (0.71875, 0.03, 7)
POSITIVE = ["mu_f1", "mu_f2", "k_f1", "k_f2", "tau", "marks_a", "load_a", "load_b"]


def draw(rng, n):
    """All inputs, one array of n trials each."""
    x = {name: mean + sd * rng.standard_normal(n) for name, mean, sd in NORMALS}
    for name, lo, hi in RECTANGULARS:
        x[name] = lo + (hi - lo) * rng.random(n)
    mean, scale, dof = MU_F1
    x["mu_f1"] = mean + scale * rng.standard_t(dof, n)
    return x


def chain(x):
    """All results and which trials are physically possible."""
    leg = lambda a, b: np.sqrt((x["e" + b] - x["e" + a]) ** 2 + (x["n" + b] - x["n" + a]) ** 2)
    course = lambda a, b: np.arctan2(x["n" + b] - x["n" + a], x["e" + b] - x["e" + a])
    # From impact to rest.
    drag_a = x["k_f1"] * x["share_a"] * x["mu_f1"]
    after_a = np.sqrt(2.0 * G * drag_a * (leg("31", "32") + leg("32", "33")))
    grade = x["grade_b2"]
    slope = np.sqrt(1.0 + grade * grade)
    drag_b2 = (x["k_f2"] * x["share_b2"] * x["mu_f2"] + grade) / slope
    verge_b = np.sqrt(2.0 * G * drag_b2 * (leg("43", "44") * slope))
    drag_b1 = x["k_f1"] * x["share_b1"] * x["mu_f1"]
    after_b = np.sqrt(verge_b * verge_b + 2.0 * G * drag_b1 * (leg("41", "42") + leg("42", "43")))
    # Momentum after impact, the road's impulse taken out.
    m_a = x["vehicle_a"] + x["load_a"]
    m_b = x["vehicle_b"] + x["load_b"]
    theta_a, theta_b = course("31", "32"), course("41", "42")
    wax, way = after_a * np.cos(theta_a), after_a * np.sin(theta_a)
    wbx, wby = after_b * np.cos(theta_b), after_b * np.sin(theta_b)
    road = 0.5 * x["mu_f1"] * G * x["tau"]
    px = m_a * (wax - x["z_ax"] * road) + m_b * (wbx - x["z_bx"] * road)
    py = m_a * (way - x["z_ay"] * road) + m_b * (wby - x["z_by"] * road)
    # Speeds before impact.
    sin_a, cos_a = np.sin(x["alpha_a"]), np.cos(x["alpha_a"])
    sin_b, cos_b = np.sin(x["alpha_b"]), np.cos(x["alpha_b"])
    cross = sin_b * cos_a - cos_b * sin_a
    before_a = (px * sin_b - py * cos_b) / (m_a * cross)
    before_b = (px * sin_a - py * cos_a) / (m_b * -cross)
    vax, vay = before_a * cos_a, before_a * sin_a
    vbx, vby = before_b * cos_b, before_b * sin_b
    # What the impact did to the units.
    dax, day = wax - vax, way - vay
    dbx, dby = wbx - vbx, wby - vby
    pdof = lambda dx, dy, s, c: np.arctan2(dy * c - dx * s, -(dx * c + dy * s))
    energy = 0.5 * m_a * (before_a**2 - after_a**2) + 0.5 * m_b * (before_b**2 - after_b**2)
    rx, ry = vax - vbx, vay - vby
    restitution = ((wbx - wax) * dbx + (wby - way) * dby) / (rx * dbx + ry * dby)
    # Marks before impact.
    grade = x["grade_a"]
    drag_a1 = (x["mu_f1"] + grade) / np.sqrt(1.0 + grade * grade)
    marks_a = np.sqrt(before_a * before_a + 2.0 * G * drag_a1 * x["marks_a"])
    results = {
        "A.post_impact_speed": after_a,
        "B.post_impact_speed": after_b,
        "A.impact_speed": before_a,
        "B.impact_speed": before_b,
        "A.delta_v": np.sqrt(dax * dax + day * day),
        "A.pdof": pdof(dax, day, sin_a, cos_a),
        "B.delta_v": np.sqrt(dbx * dbx + dby * dby),
        "B.pdof": pdof(dbx, dby, sin_b, cos_b),
        "closing_speed": np.sqrt(rx * rx + ry * ry),
        "energy_lost": energy,
        "restitution": restitution,
        "A.speed_at_start_of_marks": marks_a,
    }
    possible = (before_a >= 0.0) & (before_b >= 0.0) & (energy >= -1e-6)
    possible &= (restitution >= -1.0) & (restitution <= 1.0 + 1e-9)
    for name in POSITIVE:
        possible &= x[name] >= 0.0
    for column in results.values():
        possible &= np.isfinite(column)
    return results, possible


def rate(step, batch, trials):
    """Trials a second of step(batch)."""
    start = time.perf_counter()
    for _ in range(max(1, trials // batch)):
        step(batch)
    return max(1, trials // batch) * batch / (time.perf_counter() - start)


def moments(rng, trials, batch):
    """Mean and standard error of each result; possible and impossible trials."""
    n, first, second = 0, {}, {}
    for _ in range(trials // batch):
        results, possible = chain(draw(rng, batch))
        n += int(possible.sum())
        for name, column in results.items():
            column = column[possible]
            first[name] = first.get(name, 0.0) + float(column.sum())
            second[name] = second.get(name, 0.0) + float((column * column).sum())
    means = {name: total / n for name, total in first.items()}
    errors = {name: max(second[name] / n - m * m, 0.0) ** 0.5 / n**0.5 for name, m in means.items()}
    return means, errors, trials // batch * batch - n


def main():
    trials = int(sys.argv[1]) if len(sys.argv) > 1 else 1_000_000
    rng = np.random.default_rng(1)
    whole = lambda n: chain(draw(rng, n))
    np.seterr(invalid="ignore", divide="ignore")
    rates = {}
    for batch in (1_000, 2_000, 5_000, 10_000, 20_000, 50_000, 100_000):
        whole(batch)
        rates[batch] = max(rate(whole, batch, trials // 5) for _ in range(3))
    best = max(rates, key=rates.get)
    means, errors, impossible = moments(rng, trials, best)
    print(json.dumps({
        "numpy": np.__version__,
        "rates": {str(batch): value for batch, value in rates.items()},
        "batch": best,
        "chain": rates[best],
        "draws": max(rate(lambda n: draw(rng, n), best, trials // 5) for _ in range(3)),
        "impossible": impossible,
        "means": means,
        "errors": errors,
    }))


if __name__ == "__main__":
    main()
