"""Checks of the solver itself: the published cases, and a second, coarser method on the random structures.

The second method cuts every frame and beam into many short parts, each a textbook Timoshenko
stiffness with its load lumped half and half on its ends. Only joint movements are compared. It
shares with the solver the reading of the file, the section properties, the turning of loads into
member axes, the choice of slack bars and of directions without stiffness; these rest on the
published cases and on reading alone.

    python3 verify.py
"""
import os
import re

import numpy as np
import scipy.sparse as sp
import scipy.sparse.linalg as spl
import yaml

import solve as independent
import units

HERE = os.path.dirname(os.path.abspath(__file__))
PUBLISHED = os.path.join(HERE, "..", "published")


def value_at(result, path):
    if path.startswith("radius "):
        s = result["sections"][path.split()[1]]
        return (s["inertia"] / s["area"]) ** 0.5
    if path.startswith("checks{"):
        want = dict(pair.split(": ") for pair in re.search(r"\{(.*)\}", path).group(1).split(", "))
        row = next(r for r in result["checks"] if all(r[k] == v for k, v in want.items()))
        return row[path.rsplit(".", 1)[1]]
    for key in path.split("."):
        result = result[key]
    return result


def published():
    count = bad = 0
    for file in sorted(os.listdir(PUBLISHED)):
        if not file.endswith(".expected.yaml"):
            continue
        with open(os.path.join(PUBLISHED, file), encoding="utf-8") as f:
            case = yaml.safe_load(f)
        with open(os.path.join(PUBLISHED, file.replace(".expected", "")), encoding="utf-8") as f:
            result = independent.solve(f.read())
        for e in case["expected"]:
            count += 1
            exact = e["exact"]
            got = value_at(result, e["path"])
            # figures that stand for nothing carry the noise of their own computation
            near = e.get("atol", 1e-9 if abs(exact) < 1e-9 else 0.0)
            loose = 1e-6 if "published" in e else 3e-9
            if abs(got - exact) > max(e.get("rtol", loose) * abs(exact), near):
                bad += 1
                print(case["id"], e["path"], got, exact)
    with open(os.path.join(PUBLISHED, "units.yaml"), encoding="utf-8") as f:
        for e in yaml.safe_load(f)["units"]:
            count += 1
            text = e["text"]
            got = units.parse(text.split(" × ")[0])[0] * (units.G0 if " × g" in text else 1)
            if abs(got - e["si"]) > 1e-14 * abs(e["si"]):
                bad += 1
                print(text, got, e["si"])
    print(f"published: {count} values, {bad} differ")


def brute(job, loads, slack, parts=100):
    """Joint movements from short lumped parts."""
    names = list(job.nodes)
    first = {n: 3 * i for i, n in enumerate(names)}
    size, entries, force = 3 * len(names), [], {}

    def add_force(i, v):
        force[i] = force.get(i, 0.0) + v

    for n, f in loads.joint.items():
        for i in range(3):
            add_force(first[n] + i, f[i])
    for m in job.members.values():
        L, c, s = m.length, m.c, m.s
        i0, i1 = first[m.start], first[m.end]
        free = loads.strain[m.name] + loads.misfit[m.name] / L

        def local_force(i, along, across, couple=0.0):
            add_force(i, along * c - across * s)
            add_force(i + 1, along * s + across * c)
            if couple:
                add_force(i + 2, couple)

        if not m.bends:
            cut = np.linspace(0, L, 2001)
            for a, b, xa, xb, ya, yb in loads.lines[m.name]:
                for p, q in zip(cut, cut[1:]):
                    mid = (p + q) / 2
                    w = max(0.0, min(q, b) - max(p, a))
                    if w:
                        t = (mid - a) / (b - a)
                        for i, share in ((i0, 1 - mid / L), (i1, mid / L)):
                            local_force(i, (xa + (xb - xa) * t) * w * share, (ya + (yb - ya) * t) * w * share)
            for x, px, py, k in loads.points[m.name]:
                local_force(i0, px * (1 - x / L), py * (1 - x / L) - k / L)
                local_force(i1, px * x / L, py * x / L + k / L)
            if m.name not in slack:
                d = {i0: -c, i0 + 1: -s, i1: c, i1 + 1: s}
                entries.append((list(d), m.E * m.A / L * np.outer(list(d.values()), list(d.values()))))
                for i, v in d.items():
                    add_force(i, m.E * m.A * free * v)
            continue
        grid = sorted({L * i / parts for i in range(parts + 1)} | set(independent.breaks(m, loads)))
        grid = [x for i, x in enumerate(grid) if i == 0 or x - grid[i - 1] > 1e-9 * L]
        where = []
        for i, x in enumerate(grid):
            if i in (0, len(grid) - 1):
                where.append([i0 if i == 0 else i1])
            else:
                where.append([size])
                size += 3
        turn = [w[0] + 2 for w in where]
        if m.hinge_start:
            turn[0], size = size, size + 1
        if m.hinge_end:
            turn[-1], size = size, size + 1
        T = np.zeros((6, 6))
        for k in (0, 3):
            T[k, k], T[k, k + 1], T[k + 1, k], T[k + 1, k + 1], T[k + 2, k + 2] = c, s, -s, c, 1
        EA = 0.0 if m.kind == "beam" else m.E * m.A
        for j, (a, b) in enumerate(zip(grid, grid[1:])):
            h, EI = b - a, m.E * m.I
            f = 12 * EI / (m.GA * h * h) if m.GA else 0.0
            g = EI / ((1 + f) * h**3)
            k = np.zeros((6, 6))
            # along its axis a beam is a chain that hangs on its start and ends short of its end
            k[np.ix_([0, 3], [0, 3])] = (EA or m.E * m.A) / h * np.array([[1, -1], [-1, 1]])
            if m.kind == "beam" and j == len(grid) - 2:
                k[np.ix_([0, 3], [0, 3])] = 0.0
            k[np.ix_([1, 2, 4, 5], [1, 2, 4, 5])] = g * np.array([
                [12, 6 * h, -12, 6 * h], [6 * h, (4 + f) * h * h, -6 * h, (2 - f) * h * h],
                [-12, -6 * h, 12, -6 * h], [6 * h, (2 - f) * h * h, -6 * h, (4 + f) * h * h]])
            dofs = [where[j][0], where[j][0] + 1, turn[j], where[j + 1][0], where[j + 1][0] + 1, turn[j + 1]]
            entries.append((dofs, T.T @ k @ T))
            kap = loads.curvature[m.name]
            q = np.zeros(6)
            if EA:
                q[0], q[3] = -EA * free, EA * free
            q[2], q[5] = -EI * kap, EI * kap
            for la, lb, xa, xb, ya, yb in loads.lines[m.name]:
                if la < (a + b) / 2 < lb:
                    t = ((a + b) / 2 - la) / (lb - la)
                    qx, qy = (xa + (xb - xa) * t) * h / 2, (ya + (yb - ya) * t) * h / 2
                    q[1], q[4] = q[1] + qy, q[4] + qy
                    if m.kind == "beam":
                        add_force(i0, 2 * qx * (1 - (a + b) / 2 / L) * c), add_force(i0 + 1, 2 * qx * (1 - (a + b) / 2 / L) * s)
                        add_force(i1, 2 * qx * (a + b) / 2 / L * c), add_force(i1 + 1, 2 * qx * (a + b) / 2 / L * s)
                    else:
                        q[0], q[3] = q[0] + qx, q[3] + qx
            for i, v in zip(dofs, T.T @ q):
                add_force(i, v)
        for x, px, py, k in loads.points[m.name]:
            j = min(range(len(grid)), key=lambda j: abs(grid[j] - x))
            if m.kind == "beam":
                local_force(i0, px * (1 - x / L), 0.0), local_force(i1, px * x / L, 0.0)
                px = 0.0
            local_force(where[j][0], px, py)
            ends = j in (0, len(grid) - 1)
            add_force(where[j][0] + 2 if ends else turn[j], k)
    rows, cols, vals = [], [], []
    for dofs, k in entries:
        for i, a in enumerate(dofs):
            for j, b in enumerate(dofs):
                rows.append(a), cols.append(b), vals.append(k[i, j])
    right = np.zeros(size)
    for i, v in force.items():
        right[i] += v
    ties = []
    for n, held in job.supports.items():
        for axis, (d, flex) in held.items():
            settle = loads.settle.get((n, axis), 0.0)
            if flex:
                for i in range(3):
                    for j in range(3):
                        if d[i] and d[j]:
                            rows.append(first[n] + i), cols.append(first[n] + j), vals.append(d[i] * d[j] / flex)
                    right[first[n] + i] += d[i] * settle / flex
            else:
                ties.append((n, d, settle))
    ties += [(n, d, 0.0) for n, d in independent.loose_directions(job, slack)]
    right = np.concatenate([right, [t[2] for t in ties]])
    for j, (n, d, _) in enumerate(ties):
        for i in range(3):
            if d[i]:
                rows += [size + j, first[n] + i]
                cols += [first[n] + i, size + j]
                vals += [d[i], d[i]]
    matrix = sp.csc_matrix((vals, (rows, cols)), shape=(len(right), len(right)))
    answer = spl.spsolve(matrix, right)
    return {n: answer[first[n]:first[n] + 3] for n in names}


def random_structures():
    worst = 0.0
    for file in sorted(os.listdir(HERE)):
        if not file.endswith(".yaml"):
            continue
        with open(os.path.join(HERE, file), encoding="utf-8") as f:
            job = independent.Job(f.read())
        for c, factors in job.combinations.items():
            loads, slack, moves, reactions, states = independent.solve_combination(job, factors)
            other = brute(job, loads, slack)
            for part in (slice(0, 2), slice(2, 3)):
                size = max(np.abs(d[part]).max() for d in moves.values())
                if size < 1e-15:
                    continue
                gap = max(np.abs(moves[n][part] - other[n][part]).max() for n in moves) / size
                worst = max(worst, gap) if gap == gap else float("inf")
                if not gap < 1e-3:
                    print(f"{file} {c}: {gap:.1e}")
    print(f"random structures: largest difference of a movement {worst:.1e} of the largest movement")


if __name__ == "__main__":
    published()
    random_structures()
