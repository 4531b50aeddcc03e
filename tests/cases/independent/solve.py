"""An independent solver of the input language, for comparison with the program's results.

It shares no code, no units table and no method with the program.  No stiffness matrix and
no fixed-end force is formed for frames and beams: every member is integrated from its start
face (statics first, then curvature, slope and deflection, as exact polynomials between the
places where its load changes), and the unknown start values, joint movements and support
forces are found together from compatibility, joint equilibrium and the support conditions.

    python3 solve.py job.yaml            prints the results structure as JSON
"""
import json
import sys
from math import atan2, cos, hypot, pi, sin, sqrt

import numpy as np
import scipy.linalg as sla
import yaml
from numpy.polynomial import Polynomial as P

import sections
import units
from units import si

X = P([0.0, 1.0])
SECTION_DIMENSIONS = {"area": units.AREA, "inertia": units.INERTIA, "minor_inertia": units.INERTIA, "shear_area": units.AREA}


class Refused(Exception):
    """The structure cannot be solved: a mechanism, or a load where nothing resists it."""


def truth(text):
    return str(text).strip().lower() == "true"


def as_list(value):
    return value if isinstance(value, list) else [value]


# ---------------------------------------------------------------- reading

class Job:
    """The file with every value in SI."""

    def __init__(self, text):
        raw = yaml.load(text, Loader=yaml.BaseLoader)  # every leaf stays text: on, no, 1e3, y
        self.raw = raw
        self.g = si(raw.get("gravity", "9.80665 m/s2"), units.ACCELERATION)
        self.materials = {k: self.material(v) for k, v in raw.get("materials", {}).items()}
        self.sections = {k: self.section(v) for k, v in raw.get("sections", {}).items()}
        self.nodes = {k: (si(v["x"], units.LENGTH), si(v["y"], units.LENGTH)) for k, v in raw["nodes"].items()}
        self.supports = {k: self.support(v) for k, v in raw.get("supports", {}).items()}
        self.members = {k: Member(k, v, self) for k, v in raw["members"].items()}
        self.cases = raw["load_cases"]
        if raw.get("combinations"):
            self.combinations = {k: {c: float(f) for c, f in v["factors"].items()} for k, v in raw["combinations"].items()}
        else:
            self.combinations = {k: {k: 1.0} for k in self.cases}

    @staticmethod
    def material(v):
        dims = {"E": units.STRESS, "G": units.STRESS, "density": units.DENSITY, "expansion": units.EXPANSION}
        out = {k: si(v[k], d) for k, d in dims.items() if k in v}
        out["allowable"] = {k: si(t, units.STRESS) for k, t in v.get("allowable", {}).items() if k != "source"}
        return out

    @staticmethod
    def section(v):
        p = {}
        for k, t in v.items():
            if k == "plates":
                p[k] = [{a: si(b, units.LENGTH) for a, b in q.items()} for q in t]
            elif k not in ("shape", "source", "turned"):
                p[k] = si(t, SECTION_DIMENSIONS.get(k, units.LENGTH))
        out = sections.properties(v["shape"], p, truth(v.get("turned", "")))
        if "shear_area" in p:
            out["shear_area"] = p["shear_area"]
        return out

    @staticmethod
    def support(v):
        if isinstance(v, str):
            v = {"hold": {"fixed": ["x", "y", "r"], "pinned": ["x", "y"]}[v]}
        turned = si(v.get("turned", "0"), units.ANGLE)
        c, s = cos(turned), sin(turned)
        axes = {"x": np.array([c, s, 0.0]), "y": np.array([-s, c, 0.0]), "r": np.array([0.0, 0.0, 1.0])}
        rows = {a: (axes[a], 0.0) for a in v.get("hold", [])}  # direction and flexibility
        for a, t in v.get("spring", {}).items():
            value, dims = units.parse(t)
            rows[a] = (axes[a], 1.0 / value)
        return rows


class Member:
    def __init__(self, name, v, job):
        self.name, self.kind = name, v["kind"]
        self.start, self.end = v["from"], v["to"]
        (x0, y0), (x1, y1) = job.nodes[self.start], job.nodes[self.end]
        self.length = hypot(x1 - x0, y1 - y0)
        self.c, self.s = (x1 - x0) / self.length, (y1 - y0) / self.length
        self.material, self.section = job.materials[v["material"]], job.sections[v["section"]]
        self.E, self.A, self.I = self.material["E"], self.section["area"], self.section.get("inertia")
        self.top, self.bottom = self.section.get("top"), self.section.get("bottom")
        self.GA = None
        if "G" in self.material and "shear_area" in self.section:
            self.GA = self.material["G"] * self.section["shear_area"]
        hinge = v.get("hinge", "")
        self.hinge_start, self.hinge_end = hinge in ("start", "both"), hinge in ("end", "both")
        self.tension_only = truth(v.get("tension_only", ""))
        self.allowable = dict(self.material["allowable"])
        self.allowable.update({k: si(t, units.STRESS) for k, t in v.get("allowable", {}).items() if k != "source"})
        self.effective = {}
        for k, t in v.get("effective_length", {}).items():
            value, dims = units.parse(t)
            self.effective[k] = value if dims == units.LENGTH else value * self.length

    @property
    def bends(self):
        return self.kind in ("frame", "beam")

    def along(self, d):
        return self.c * d[0] + self.s * d[1]

    def across(self, d):
        return -self.s * d[0] + self.c * d[1]


# ---------------------------------------------------------------- loads of one combination

class Loads:
    """Everything that acts in one combination, the factors already in it."""

    def __init__(self, job, factors):
        self.job = job
        self.joint = {n: np.zeros(3) for n in job.nodes}
        self.settle = {}
        self.lines = {m: [] for m in job.members}    # (a, b, qx_a, qx_b, qy_a, qy_b)
        self.points = {m: [] for m in job.members}   # (x, px, py, couple)
        self.strain = dict.fromkeys(job.members, 0.0)
        self.curvature = dict.fromkeys(job.members, 0.0)
        self.misfit = dict.fromkeys(job.members, 0.0)
        for case, factor in factors.items():
            self.case(job.cases[case], factor)
        self.total = np.zeros(3)                     # resultant about the global origin
        self.size = 0.0
        self.sum_up()

    def case(self, case, f):
        own = str(case.get("self_weight", "false"))
        weight = {"true": 1.0, "false": 0.0}.get(own.lower())
        weight = float(own) if weight is None else weight
        if weight:
            for m in self.job.members.values():
                w = -f * weight * self.job.g * m.material["density"] * m.A
                self.lines[m.name].append((0.0, m.length, w * m.s, w * m.s, w * m.c, w * m.c))
        for load in case.get("loads", []) or []:
            self.one(load, f)

    def one(self, load, f):
        if "settle" in load:
            for a in "xyr":
                if a in load:
                    value = si(load[a], units.ANGLE if a == "r" else units.LENGTH)
                    key = (load["settle"], a)
                    self.settle[key] = self.settle.get(key, 0.0) + f * value
            return
        if "on" not in load:
            for i, (k, d) in enumerate((("fx", units.FORCE), ("fy", units.FORCE), ("m", units.MOMENT))):
                self.joint[load["at"]][i] += f * si(load.get(k, "0"), d)
            return
        for name in as_list(load["on"]):
            self.on_member(self.job.members[name], load, f)

    def on_member(self, m, load, f):
        unit = {"X": (m.c, -m.s), "Y": (m.s, m.c), "x": (1.0, 0.0), "y": (0.0, 1.0)}.get(load.get("dir"))
        if "w" in load:
            w = as_list(load["w"])
            w = [f * si(t, units.LINE_LOAD) for t in (w if len(w) == 2 else w * 2)]
            if load.get("per") == "plan":
                square = {"X": abs(m.s), "Y": abs(m.c), "x": 0.0, "y": 1.0}[load["dir"]]
                w = [q * square for q in w]
            a, b = (0.0, m.length)
            if "over" in load:
                a, b = (self.place(m, t) for t in load["over"])
            self.lines[m.name].append((a, b, w[0] * unit[0], w[1] * unit[0], w[0] * unit[1], w[1] * unit[1]))
        elif "p" in load:
            p = f * si(load["p"], units.FORCE)
            self.points[m.name].append((self.place(m, load["at"]), p * unit[0], p * unit[1], 0.0))
        elif "m" in load:
            self.points[m.name].append((self.place(m, load["at"]), 0.0, 0.0, f * si(load["m"], units.MOMENT)))
        elif "warm" in load:
            warm, alpha = load["warm"], m.material["expansion"]
            if isinstance(warm, dict):
                top, bottom = (si(warm[k], units.TEMPERATURE) for k in ("top", "bottom"))
                slope = (top - bottom) / (m.top + m.bottom)
                self.strain[m.name] += f * alpha * (bottom + slope * m.bottom)
                if m.bends:  # hot side outward: warmer above bows up, a negative curvature
                    self.curvature[m.name] -= f * alpha * slope
            else:
                self.strain[m.name] += f * alpha * si(warm, units.TEMPERATURE)
        elif "too_long" in load:
            self.misfit[m.name] += f * si(load["too_long"], units.LENGTH)

    @staticmethod
    def place(m, text):
        text = str(text).strip()
        if text.endswith("%"):
            return float(text[:-1]) / 100 * m.length
        return si(text, units.LENGTH)

    def sum_up(self):
        """Resultant of all loads, taken from the loads themselves, not from what the solver makes of them."""
        def add(fx, fy, couple, x, y):
            self.total += np.array([fx, fy, couple + x * fy - y * fx])
            self.size += abs(fx) + abs(fy)
        for n, load in self.joint.items():
            add(*load, *self.job.nodes[n])
        for m in self.job.members.values():
            x0, y0 = self.job.nodes[m.start]
            resultants = [(x, px, py, k) for x, px, py, k in self.points[m.name]]
            for a, b, xa, xb, ya, yb in self.lines[m.name]:
                for part_a, part_b, direction in ((xa, xb, 0), (ya, yb, 1)):
                    force, first = (part_a + part_b) * (b - a) / 2, (part_a + 2 * part_b) * (b - a) ** 2 / 6
                    place = a + (first / force if force else 0.0)
                    couple = 0.0 if force else (first if direction else 0.0)
                    resultants.append((place, force if direction == 0 else 0.0, force if direction else 0.0, couple))
            for x, px, py, k in resultants:
                add(px * m.c - py * m.s, px * m.s + py * m.c, k, x0 + x * m.c, y0 + x * m.s)


# ---------------------------------------------------------------- one member

def breaks(m, loads):
    """Places where the load on a member changes, its ends included."""
    places = {0.0, m.length}
    for a, b, *_ in loads.lines[m.name]:
        places |= {a, b}
    places |= {p[0] for p in loads.points[m.name]}
    tidy = []
    for x in sorted(min(max(p, 0.0), m.length) for p in places):
        if not tidy or x - tidy[-1] > 1e-12 * m.length:
            tidy.append(x)
    tidy[-1] = m.length
    return tidy


def at_end(m, x):
    return abs(x) <= 1e-12 * m.length or abs(x - m.length) <= 1e-12 * m.length


def integrate(m, loads, start):
    """Follow a member from its start face: list of pieces (a, b, N, V, M, u, v, phi), polynomials in x - a.

    start = [u, v, phi, N, V, M].  N' = -qx, V' = qy, M' = V, u' = N/EA + free strain,
    phi' = M/EI + free curvature, v' = phi - V/GA.
    """
    u, v, phi, n, shear, moment = start
    places, out = breaks(m, loads), []
    free = loads.strain[m.name] + loads.misfit[m.name] / m.length if m.kind == "frame" else 0.0
    for a, b in zip(places, places[1:]):
        qx, qy = P([0.0]), P([0.0])
        for la, lb, xa, xb, ya, yb in loads.lines[m.name]:
            if la < b - 1e-12 * m.length and lb > a + 1e-12 * m.length:
                t = (a - la) / (lb - la)
                qx += P([xa + (xb - xa) * t, (xb - xa) / (lb - la)])
                qy += P([ya + (yb - ya) * t, (yb - ya) / (lb - la)])
        for x, px, py, couple in loads.points[m.name]:
            if abs(x - a) <= 1e-12 * m.length and not at_end(m, x):
                n, shear, moment = n - px, shear + py, moment - couple
        N = n - qx.integ()
        if m.kind == "beam":
            N = P([0.0])
        V = shear + qy.integ()
        M = moment + V.integ()
        U = u + (N / (m.E * m.A) + free).integ() if m.kind == "frame" else P([0.0])
        F = phi + (M / (m.E * m.I) + loads.curvature[m.name]).integ()
        D = v + (F - (V / m.GA if m.GA else 0.0)).integ()
        out.append((a, b, N, V, M, U, D, F))
        h = b - a
        n, shear, moment, u, v, phi = N(h), V(h), M(h), U(h), D(h), F(h)
    return out


def end_values(pieces):
    a, b, N, V, M, U, D, F = pieces[-1]
    h = b - a
    return np.array([U(h), D(h), F(h), N(h), V(h), M(h)])


def bar_end_loads(m, loads):
    """What a bar hands to its ends: 2 along the axis (bar), 3 consistent (bar3), 2 across by statics."""
    L = m.length
    lever, across, consistent = np.zeros(2), np.zeros(2), np.zeros(3)
    nodes, weights = np.polynomial.legendre.leggauss(4)
    shape = lambda x: np.array([(1 - x / L) * (1 - 2 * x / L), 4 * x / L * (1 - x / L), x / L * (2 * x / L - 1)])
    for a, b, xa, xb, ya, yb in loads.lines[m.name]:
        for g, w in zip(nodes, weights):
            t = (g + 1) / 2
            x, dx = a + (b - a) * t, w * (b - a) / 2
            qx, qy = (xa + (xb - xa) * t) * dx, (ya + (yb - ya) * t) * dx
            lever += qx * np.array([1 - x / L, x / L])
            consistent += qx * shape(x)
            across += qy * np.array([1 - x / L, x / L])
    for x, px, py, couple in loads.points[m.name]:
        lever += px * np.array([1 - x / L, x / L])
        consistent += px * shape(x)
        across += py * np.array([1 - x / L, x / L]) + couple * np.array([-1.0, 1.0]) / L
    return lever, consistent, across


# ---------------------------------------------------------------- the whole structure

def loose_directions(job, slack):
    """Per node, unit directions that nothing stiffens: list of (node, direction)."""
    out = []
    for n in job.nodes:
        plane, turning = np.zeros((2, 2)), False
        for m in job.members.values():
            if n not in (m.start, m.end) or m.name in slack:
                continue
            t, q = np.array([m.c, m.s]), np.array([-m.s, m.c])
            here = m.hinge_start if n == m.start else m.hinge_end
            if m.kind != "beam":
                plane += np.outer(t, t)
            if m.bends and not (m.hinge_start and m.hinge_end):
                plane += np.outer(q, q)
            if m.bends and not here:
                turning = True
        for axis, (d, _) in job.supports.get(n, {}).items():
            if axis == "r":
                turning = True
            else:
                plane += np.outer(d[:2], d[:2])
        values, vectors = np.linalg.eigh(plane)
        for value, vector in zip(values, vectors.T):
            if value < 1e-12:
                out.append((n, np.array([vector[0], vector[1], 0.0])))
        if not turning:
            out.append((n, np.array([0.0, 0.0, 1.0])))
    return out


def solve_linear(job, loads, slack):
    """Joint movements, support forces and the state of every member."""
    names = list(job.nodes)
    first = {n: 3 * i for i, n in enumerate(names)}
    size = 3 * len(names)
    state = {}
    for m in job.members.values():
        if m.name not in slack or m.bends:
            state[m.name] = size
            size += {"frame": 6, "beam": 6, "bar": 1, "bar3": 3}[m.kind]
    holds = [(n, a, d, flex, loads.settle.get((n, a), 0.0)) for n, rows in job.supports.items() for a, (d, flex) in rows.items()]
    loose = loose_directions(job, slack)
    ties = [(n, d, flex, s) for n, a, d, flex, s in holds] + [(n, d, 0.0, 0.0) for n, d in loose]
    first_tie, size = size, size + len(ties)

    matrix, right, row = np.zeros((size, size)), np.zeros(size), 3 * len(names)
    balance = lambda n: first[n]  # rows of joint equilibrium
    for n in names:
        right[first[n]:first[n] + 3] -= loads.joint[n]

    def push(n, column, m, along, across, couple=0.0):
        """A unit of the unknown acts on joint n with these parts in the member's axes."""
        r = balance(n)
        matrix[r, column] += along * m.c - across * m.s
        matrix[r + 1, column] += along * m.s + across * m.c
        matrix[r + 2, column] += couple

    def push_known(n, m, along, across, couple=0.0):
        r = balance(n)
        right[r] -= along * m.c - across * m.s
        right[r + 1] -= along * m.s + across * m.c
        right[r + 2] -= couple

    for m in job.members.values():
        L, i0, i1 = m.length, first[m.start], first[m.end]
        T, Q = np.array([m.c, m.s, 0.0]), np.array([-m.s, m.c, 0.0])
        lever, consistent, across = bar_end_loads(m, loads)
        if m.bends:
            k = state[m.name]
            particular = end_values(integrate(m, loads, np.zeros(6)))
            carry = np.zeros((6, 6))
            quiet = Loads.__new__(Loads)
            quiet.lines, quiet.points = {m.name: []}, {m.name: []}
            quiet.strain = quiet.curvature = quiet.misfit = {m.name: 0.0}
            for j in range(6):
                unit_state = np.zeros(6)
                unit_state[j] = 1.0
                carry[:, j] = end_values(integrate(m, quiet, unit_state))
            # the start: movements equal the joint's; the end the same after integration
            for d, j, end in ((T, 0, False), (Q, 1, False), (T, 0, True), (Q, 1, True)):
                if j == 0 and m.kind == "beam":
                    # no axial stiffness: no axial force, nothing asked of the movement along the axis
                    matrix[row, k + (3 if not end else 0)] = 1.0
                    row += 1
                    continue
                joint = i1 if end else i0
                matrix[row, joint:joint + 3] += d
                if end:
                    matrix[row, k:k + 6] -= carry[j]
                    right[row] = particular[j]
                else:
                    matrix[row, k + j] = -1.0
                row += 1
            for end, hinged in ((False, m.hinge_start), (True, m.hinge_end)):
                which = 5 if hinged else 2
                if end:
                    matrix[row, k:k + 6] = -carry[which]
                    right[row] = particular[which]
                else:
                    matrix[row, k + which] = -1.0
                if not hinged:
                    matrix[row, (i1 if end else i0) + 2] += 1.0
                row += 1
            # forces of the member on its joints: (N, -V, M) at the start, reversed at the end
            push(m.start, k + 3, m, 1.0, 0.0)
            push(m.start, k + 4, m, 0.0, -1.0)
            push(m.start, k + 5, m, 0.0, 0.0, 1.0)
            for j in range(6):
                push(m.end, k + j, m, -carry[3, j], carry[4, j], -carry[5, j])
            push_known(m.end, m, -particular[3], particular[4], -particular[5])
            if m.kind == "beam":
                push_known(m.start, m, lever[0], 0.0)
                push_known(m.end, m, lever[1], 0.0)
            # loads at the very ends act on the joints
            for x, px, py, couple in loads.points[m.name]:
                if at_end(m, x):
                    px = 0.0 if m.kind == "beam" else px
                    push_known(m.start if x < L / 2 else m.end, m, px, py, couple)
            continue
        push_known(m.start, m, 0.0, across[0])
        push_known(m.end, m, 0.0, across[1])
        free = loads.strain[m.name] + loads.misfit[m.name] / L
        if m.name in slack or m.kind == "bar":
            push_known(m.start, m, lever[0], 0.0)
            push_known(m.end, m, lever[1], 0.0)
            if m.name in slack:
                continue
            k = state[m.name]
            matrix[row, i1:i1 + 3] += T
            matrix[row, i0:i0 + 3] -= T
            matrix[row, k] = -L / (m.E * m.A)
            right[row] = free * L
            row += 1
            push(m.start, k, m, 1.0, 0.0)
            push(m.end, k, m, -1.0, 0.0)
        else:  # bar3: unknown pull at both ends and the movement of its middle
            k = state[m.name]
            stiff = m.E * m.A / (3 * L) * np.array([[7.0, -8, 1], [-8, 16, -8], [1, -8, 7]])
            for r in range(3):
                matrix[row, i0:i0 + 3] += stiff[r, 0] * T
                matrix[row, i1:i1 + 3] += stiff[r, 2] * T
                matrix[row, k + 2] += stiff[r, 1]
                matrix[row, k] += (1.0, 0.0, 0.0)[r]
                matrix[row, k + 1] -= (0.0, 0.0, 1.0)[r]
                right[row] = consistent[r] + m.E * m.A * free * (-1.0, 0.0, 1.0)[r]
                row += 1
            push(m.start, k, m, 1.0, 0.0)
            push(m.end, k + 1, m, -1.0, 0.0)
    for j, (n, d, flex, settle) in enumerate(ties):
        r = balance(n)
        matrix[r:r + 3, first_tie + j] += d
        matrix[row, first[n]:first[n] + 3] += d
        matrix[row, first_tie + j] += flex
        right[row] = settle
        row += 1
    assert row == size

    answer = balanced_solve(matrix, right)
    scale = max(loads.size, np.abs(answer[first_tie:]).max(initial=0.0), 1e-30)
    reactions = {}
    for j, (n, d, flex, settle) in enumerate(ties):
        force = answer[first_tie + j]
        if j < len(holds):
            reactions[n] = reactions.get(n, np.zeros(3)) + force * d
        elif abs(force) > 1e-7 * scale:
            raise Refused(f"node {n}: loaded along {d}, where nothing resists")
    moves = {n: answer[first[n]:first[n] + 3] for n in names}
    states = {m: answer[k:k + {"frame": 6, "beam": 6, "bar": 1, "bar3": 3}[job.members[m].kind]] for m, k in state.items()}
    return moves, reactions, states


def balanced_solve(matrix, right):
    """LU with rows and columns brought to one size, refined with extended residuals."""
    rows, columns = np.ones(len(right)), np.ones(len(right))
    for _ in range(8):
        scaled = np.abs(rows[:, None] * matrix * columns)
        rows /= np.sqrt(np.maximum(scaled.max(axis=1), 1e-300))
        scaled = np.abs(rows[:, None] * matrix * columns)
        columns /= np.sqrt(np.maximum(scaled.max(axis=0), 1e-300))
    scaled = rows[:, None] * matrix * columns
    condition = np.linalg.cond(scaled)
    if not condition < 1e15:
        raise Refused(f"mechanism or ill conditioned: condition {condition:.1e}")
    factors = sla.lu_factor(scaled)
    wide, target = scaled.astype(np.longdouble), (rows * right).astype(np.longdouble)
    x = np.zeros(len(right), dtype=np.longdouble)
    for _ in range(6):
        x = x + sla.lu_solve(factors, np.asarray(target - wide @ x, dtype=float))
    return np.asarray(x * columns, dtype=float)


def solve_combination(job, factors):
    loads = Loads(job, factors)
    slack = set()
    for _ in range(60):
        moves, reactions, states = solve_linear(job, loads, slack)
        change = False
        for m in job.members.values():
            if not m.tension_only or m.bends:
                continue
            d = moves[m.end] - moves[m.start]
            pull = m.along(d) / m.length - loads.strain[m.name] - loads.misfit[m.name] / m.length
            if m.name in slack and pull > 1e-14:
                slack.discard(m.name)
                change = True
            elif m.name not in slack and pull < -1e-14:
                slack.add(m.name)
                change = True
        if not change:
            return loads, slack, moves, reactions, states
    raise Refused("tension-only members do not settle")


# ---------------------------------------------------------------- results

def roots_inside(p, h):
    p = p.trim()
    c = p.coef.copy()
    c = c * h ** np.arange(len(c))
    big = np.abs(c).max()
    while len(c) > 1 and abs(c[-1]) <= 1e-13 * big:
        c = c[:-1]
    if len(c) < 2 or big == 0:
        return []
    out = []
    q, dq = P(c), P(c).deriv()
    for r in q.roots():
        if abs(r.imag) < 1e-7:
            t = r.real
            for _ in range(3):  # polish
                if dq(t):
                    step = q(t) / dq(t)
                    if abs(step) < 0.1:
                        t -= step
            if 0 < t < 1:
                out.append(t * h)
    return out


class Peaks:
    """Candidates (value, place, tag) of one extreme, and whether the winner stands alone."""

    def __init__(self):
        self.seen = []

    def add(self, value, x, tag=None):
        self.seen.append((float(value), float(x), tag))

    def best(self, key):
        top = max(self.seen, key=lambda s: key(s[0]))
        return top

    def alone(self, key, length):
        top = self.best(key)
        limit = max(abs(s[0]) for s in self.seen) * 1e-7
        near = [s for s in self.seen if key(top[0]) - key(s[0]) <= limit]
        return {"x": all(abs(s[1] - top[1]) < 1e-6 * length for s in near),
                "tag": len({s[2] for s in near}) == 1,
                "sign": len({s[0] > 0 for s in near}) == 1}


def member_results(m, loads, slack, moves, states, doubt):
    out = {"length": m.length}
    L, EA = m.length, m.E * m.A
    if not m.bends:
        if m.name in slack:
            n0 = n1 = 0.0
        elif m.kind == "bar":
            n0 = n1 = states[m.name][0]
        else:
            a, b, middle = m.along(moves[m.start]), m.along(moves[m.end]), states[m.name][2]
            free = loads.strain[m.name] + loads.misfit[m.name] / L
            n0 = EA * ((-3 * a + 4 * middle - b) / L - free)
            n1 = EA * ((a - 4 * middle + 3 * b) / L - free)
            # Under a load that varies along the bar the interpolated strain misses equilibrium at
            # the ends; the end forces of the element do not.  Both agree for uniform loads.
            out["_interpolated"] = (n0, n1)
            n0, n1 = states[m.name][0], states[m.name][1]
        out["start"], out["end"] = {"n": n0}, {"n": n1}
        out["strain"] = {"start": {"axial": n0 / EA}, "end": {"axial": n1 / EA}}
        stress = Peaks()
        for n, x in ((n0, 0.0), (n1, L)):
            stress.add(n / m.A, x, "top")
        out["stress"] = {"start": {"top": n0 / m.A, "bottom": n0 / m.A}, "end": {"top": n1 / m.A, "bottom": n1 / m.A}}
        extremes(out, stress, L, doubt, m.name, bar=True)
        out["_min_n"] = min(n0, n1)
        return out
    pieces = integrate(m, loads, states[m.name])
    first, last = pieces[0], pieces[-1]
    h = last[1] - last[0]
    start = {"n": first[2](0.0), "v": first[3](0.0), "m": first[4](0.0)}
    end = {"n": last[2](h), "v": last[3](h), "m": last[4](h)}
    v0, v1 = first[6](0.0), last[6](h)
    moment, deflection, stress, axial, shear = Peaks(), Peaks(), Peaks(), Peaks(), Peaks()
    fibres = [("top", -m.top), ("bottom", m.bottom)] if m.top is not None and m.bottom is not None else []
    for a, b, N, V, M, U, D, F in pieces:
        h = b - a
        chord = P([v0 + (v1 - v0) * a / L, (v1 - v0) / L])
        bow = D - chord
        places = lambda p: [0.0, h] + roots_inside(p, h)
        for x in places(V):
            moment.add(M(x), a + x)
        for x in places(bow.deriv()):
            deflection.add(bow(x), a + x)
        for fibre, y in fibres:
            s = N / m.A + M * (y / m.I)
            for x in places(s.deriv()):
                stress.add(s(x), a + x, fibre)
        for x in places(N.deriv()):
            axial.add(N(x), a + x)
        for x in places(V.deriv()):
            shear.add(V(x), a + x)
    if m.kind == "beam":
        start.pop("n"), end.pop("n")
    out["start"], out["end"] = start, end
    out["strain"] = {}
    for k, s in (("start", start), ("end", end)):
        out["strain"][k] = {"curvature": s["m"] / (m.E * m.I)}
        if "n" in s:
            out["strain"][k]["axial"] = s["n"] / EA
    for key, peaks, letter in (("peak_moment", moment, "m"), ("peak_deflection", deflection, "v")):
        value, x, _ = peaks.best(abs)
        out[key] = {"x": x, letter: value}
        single = peaks.alone(abs, L)
        if not single["x"]:
            doubt.append((m.name, key, "x"))
        if not single["sign"]:
            doubt.append((m.name, key, letter))
    if fibres:
        out["stress"] = {}
        for k, s in (("start", start), ("end", end)):
            out["stress"][k] = {f: s.get("n", 0.0) / m.A + s["m"] * y / m.I for f, y in fibres}
        extremes(out, stress, L, doubt, m.name)
    out["_min_n"] = min(s[0] for s in axial.seen)
    out["_max_v"] = max(abs(s[0]) for s in shear.seen)
    out["_pieces"] = pieces
    return out


def extremes(out, stress, length, doubt, name, bar=False):
    for key, sign in (("largest_tension", 1.0), ("largest_compression", -1.0)):
        value, x, fibre = stress.best(lambda s: sign * s)
        out["stress"][key] = {"value": value, "x": x, "fibre": fibre}
        single = stress.alone(lambda s: sign * s, length)
        if not single["x"]:
            doubt.append((name, "stress", key, "x"))
        if bar or not single["tag"]:
            doubt.append((name, "stress", key, "fibre"))


# ---------------------------------------------------------------- elastic critical load

def critical_factor(job, loads, slack, results, pieces_per_member=24):
    """Smallest factor on all axial forces at which the structure loses its stiffness.

    Members are cut fine and the second-order terms of every part taken from the exact axial
    force along it; a bar is a pin-ended strut where its section has an inertia.
    """
    if not any(results[m]["_min_n"] < 0 for m in results if job.members[m].kind != "beam"):
        return None
    names = list(job.nodes)
    first = {n: 3 * i for i, n in enumerate(names)}
    size = 3 * len(names)
    K, G = [], []
    for m in job.members.values():
        if m.name in slack:
            continue
        L = m.length
        T, Q, R = (np.array(d) for d in ([m.c, m.s, 0.0], [-m.s, m.c, 0.0], [0.0, 0.0, 1.0]))
        r = results[m.name]
        if m.bends:
            def force(x, r=r):
                for a, b, N, *_ in r["_pieces"]:
                    if x <= b:
                        return N(x - a)
                return N(b - a)
            cuts = [p[0] for p in r["_pieces"]] + [L]
        else:
            n0, n1 = r["start"]["n"], r["end"]["n"]
            force = lambda x, n0=n0, n1=n1: n0 + (n1 - n0) * x / L
            cuts = [0.0, L]
        straight = m.kind == "bar" and m.I is None or m.kind == "bar3" and m.I is None
        count = 1 if straight else pieces_per_member
        grid = sorted(set(cuts) | {L * i / count for i in range(count + 1)})
        grid = [x for i, x in enumerate(grid) if i == 0 or x - grid[i - 1] > 1e-9 * L]
        # columns of the local unknowns: v and phi at every cut
        def node_row(n, d):
            return {first[n] + i: d[i] for i in range(3) if d[i]}
        v, phi = [], []
        for i, x in enumerate(grid):
            end = {0: m.start, len(grid) - 1: m.end}.get(i)
            if end is not None:
                v.append(node_row(end, Q))
            else:
                v.append({size: 1.0})
                size += 1
            if straight:
                phi.append({})
                continue
            hinged = not m.bends or (m.hinge_start if i == 0 else m.hinge_end if end is not None else False)
            if end is not None and not hinged:
                phi.append(node_row(end, R))
            else:
                phi.append({size: 1.0})
                size += 1
        if m.kind != "beam":
            stretch = [node_row(m.start, -T), node_row(m.end, T)]
            K.append((stretch, m.E * m.A / L * np.ones((2, 2))))
        gauss, weights = np.polynomial.legendre.leggauss(5)
        for i, (a, b) in enumerate(zip(grid, grid[1:])):
            h = b - a
            if straight:
                mean = sum(w * force(a + h * (g + 1) / 2) for g, w in zip(gauss, weights)) / 2
                G.append(([v[i], v[i + 1]], mean / h * np.array([[1.0, -1], [-1, 1]])))
                continue
            EI = m.E * m.I
            f = 12 * EI / (m.GA * h * h) if m.GA and m.bends else 0.0
            k = EI / ((1 + f) * h**3) * np.array([
                [12, 6 * h, -12, 6 * h], [6 * h, (4 + f) * h * h, -6 * h, (2 - f) * h * h],
                [-12, -6 * h, 12, -6 * h], [6 * h, (2 - f) * h * h, -6 * h, (4 + f) * h * h]])
            local = [v[i], phi[i], v[i + 1], phi[i + 1]]
            K.append((local, k))
            g_matrix = np.zeros((4, 4))
            for g, w in zip(gauss, weights):
                t = (g + 1) / 2
                slope = np.array([-6 * t + 6 * t * t - f, h * (1 - 4 * t + 3 * t * t + f * (0.5 - t)),
                                  6 * t - 6 * t * t + f, h * (-2 * t + 3 * t * t + f * (t - 0.5))]) / (h * (1 + f))
                g_matrix += w * h / 2 * force(a + t * h) * np.outer(slope, slope)
            if m.kind != "beam":
                G.append((local, g_matrix))
    stiff, geometric = np.zeros((size, size)), np.zeros((size, size))
    for target, parts in ((stiff, K), (geometric, G)):
        for local, block in parts:
            spread = np.zeros((len(local), size))
            for i, d in enumerate(local):
                for j, value in d.items():
                    spread[i, j] = value
            used = sorted({j for d in local for j in d})
            small = spread[:, used]
            target[np.ix_(used, used)] += small.T @ block @ small
    nodes = 3 * len(names)
    rows = []
    for n, held in job.supports.items():
        for d, flex in held.values():
            if flex:
                stiff[first[n]:first[n] + 3, first[n]:first[n] + 3] += np.outer(d, d) / flex
            else:
                rows.append((n, d))
    rows += loose_directions(job, slack)
    constraint = np.zeros((len(rows), nodes))
    for i, (n, d) in enumerate(rows):
        constraint[i, first[n]:first[n] + 3] = d
    free = sla.null_space(constraint) if rows else np.eye(nodes)
    Z = sla.block_diag(free, np.eye(size - nodes)) if free.shape[1] else np.vstack([np.zeros((nodes, size - nodes)), np.eye(size - nodes)])
    A, B = Z.T @ stiff @ Z, -(Z.T @ geometric @ Z)
    if A.shape[0] == 0:
        return None
    d = 1 / np.sqrt(np.diag(A))
    A, B = d[:, None] * A * d, d[:, None] * B * d
    try:
        mu = sla.eigh((B + B.T) / 2, (A + A.T) / 2, eigvals_only=True, subset_by_index=[len(d) - 1, len(d) - 1])[0]
    except np.linalg.LinAlgError as fault:
        raise Refused(f"stiffness not positive: {fault}")
    return 1 / mu if mu > 1e-12 * np.abs(B).max() else None


# ---------------------------------------------------------------- checks

def check_rows(job, results):
    """The rows the contract fixes; shear only where the section gives a shear_area."""
    checks, rows = job.raw.get("checks", {}) or {}, []

    def wanted(kind):
        value = checks.get(kind, "all")
        if value == "all":
            return list(job.members)
        return [] if value == "off" else as_list(value)

    def row(subject, combination, kind, demand, limit, ratio=None, why=None):
        ratio = (demand / limit if ratio is None and limit else ratio)
        rows.append({"id": f"{subject}.{combination}.{kind}", "kind": kind, "subject": subject, "combination": combination,
                     "demand": demand, "limit": limit, "ratio": ratio, "ok": None if ratio is None else bool(ratio <= 1)})
        if why:
            rows[-1]["why"] = why

    for c, result in results.items():
        uses = (job.raw.get("combinations") or {}).get(c, {}).get("for")
        applies = lambda kind: uses is None or kind in as_list(uses) or "all" in as_list(uses)
        if applies("stress"):
            for name in wanted("stress"):
                m, r = job.members[name], result["members"][name]
                found = []
                for key, limit_key, sign in (("largest_tension", "tension", 1), ("largest_compression", "compression", -1)):
                    if "stress" in r and limit_key in m.allowable:
                        demand = max(0.0, sign * r["stress"][key]["value"])
                        found.append((demand / m.allowable[limit_key], demand, m.allowable[limit_key]))
                if len(found) == 2:
                    _, demand, limit = max(found)
                    row(name, c, "stress", demand, limit)
                else:
                    row(name, c, "stress", None, None, why="no allowable")
        if applies("shear"):
            for name in wanted("shear"):
                m, r = job.members[name], result["members"][name]
                if m.bends and "shear" in m.allowable and "shear_area" in m.section:
                    row(name, c, "shear", r["_max_v"] / m.section["shear_area"], m.allowable["shear"])
        if applies("deflection"):
            for item in checks.get("deflection", []) or []:
                if "member" in item:
                    m = job.members[item["member"]]
                    text = str(item["limit"]).strip()
                    limit = m.length / float(text[2:]) if text.startswith("L/") else si(text, units.LENGTH)
                    row(m.name, c, "deflection", abs(result["members"][m.name]["peak_deflection"]["v"]), limit)
                else:
                    d = result["displacements"][item["node"]][item["dir"]]
                    row(item["node"], c, f"deflection.{item['dir']}", abs(d), si(item["limit"], units.ANGLE if item["dir"] == "r" else units.LENGTH))
        for name, m in job.members.items():
            push = -result["members"][name]["_min_n"]
            if m.kind == "beam" or push <= 1e-9 * result["_scale"]:
                continue
            planes = [(m.effective.get("in_plane", m.length), m.I)]
            if "out_of_plane" in m.effective:
                planes.append((m.effective["out_of_plane"], m.section.get("minor_inertia")))
            planes = [(k, i) for k, i in planes if i]
            if "buckling" in checks and applies("buckling") and planes:
                safety = float(checks["buckling"].get("safety", 1))
                row(name, c, "buckling", push, min(pi**2 * m.E * i / k**2 for k, i in planes) / safety)
            if "slenderness" in checks and applies("slenderness") and planes:
                row(name, c, "slenderness", max(k / sqrt(i / m.A) for k, i in planes), float(checks["slenderness"]))
        if "stability" in checks and applies("stability") and result["critical_load_factor"] is not None:
            least, factor = float(checks["stability"]["at_least"]), result["critical_load_factor"]
            row("structure", c, "stability", factor, least, ratio=least / factor)
    return rows


# ---------------------------------------------------------------- all together

def tidy(value, scale):
    return 0.0 if abs(value) < 1e-11 * scale else float(value)


def solve(text, doubts=None):
    """The results structure; private keys start with an underscore until `public` drops them."""
    job = Job(text)
    combinations = {}
    for c, factors in job.combinations.items():
        doubt = []
        loads, slack, moves, reactions, states = solve_combination(job, factors)
        members = {m.name: member_results(m, loads, slack, moves, states, doubt) for m in job.members.values()}
        total = loads.total.copy()
        for n, r in reactions.items():
            x, y = job.nodes[n]
            total += np.array([r[0], r[1], r[2] + x * r[1] - y * r[0]])
        combinations[c] = {
            "displacements": {n: dict(zip("xyr", map(float, d))) for n, d in moves.items()},
            "reactions": {n: dict(zip("xyr", map(float, reactions[n]))) for n in job.supports if n in reactions},
            "members": members,
            "equilibrium": dict(zip(("x", "y", "moment"), map(float, total))),
            "critical_load_factor": critical_factor(job, loads, slack, members),
            "_scale": max([loads.size] + [abs(v) for r in reactions.values() for v in r] + [1e-30]), "_slack": sorted(slack),
        }
        if doubts is not None:
            doubts[c] = doubt
    shown = ("area", "inertia", "top", "bottom")
    return {"calcsheaf": 1, "combinations": combinations,
            "sections": {k: {a: s[a] for a in shown if a in s} for k, s in job.sections.items()},
            "checks": check_rows(job, combinations)}


def public(value):
    if isinstance(value, dict):
        return {k: public(v) for k, v in value.items() if not k.startswith("_")}
    if isinstance(value, list):
        return [public(v) for v in value]
    return float(value) if isinstance(value, np.floating) else value


if __name__ == "__main__":
    with open(sys.argv[1], encoding="utf-8") as source:
        print(json.dumps(public(solve(source.read())), indent=1, ensure_ascii=False))
