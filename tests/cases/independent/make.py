"""Writes the random structures of this folder and what they must give.

    python3 make.py            writes basic-01 .. basic-12 and random-01 .. random-28
    python3 make.py --check    solves the files that are there and compares with what is written beside them

Every file has its own fixed seed.  A draw that turns out a mechanism, badly conditioned, far
too soft or past its critical load is thrown away and the next one of the same seed is taken.
"""
import json
import math
import os
import random
import sys

import solve as independent

HERE = os.path.dirname(os.path.abspath(__file__))
DIGITS = 12


def number(v, digits=4):
    return f"{float(f'{v:.{digits}g}'):g}" if abs(v) < 1e5 else f"{v:.{digits}g}"


class Units:
    """Texts of quantities; sizes are drawn in metres and kilonewtons and rounded in the unit they are written in."""

    def __init__(self, rng, us):
        self.rng, self.us = rng, us

    def span(self, m):
        if not self.us:
            return self.rng.choice([f"{round(m, 2):g} m", f"{round(m * 1000, -1):.0f} mm"])
        inches = round(m / 0.0254)
        if m < 0 or inches % 12 == 0 or self.rng.random() < 0.4:
            return f"{round(m / 0.3048, 2):g} ft"
        return f"{inches // 12} ft {inches % 12} in" if inches >= 12 else f"{inches} in"

    def small(self, m):
        return f"{number(m / 0.0254, 3)} in" if self.us else f"{number(m * 1000, 3)} mm"

    def force(self, kn):
        if self.us:
            return self.rng.choice([f"{number(kn / 4.448, 3)} kip", f"{number(kn / 4.448 * 1000, 3)} lbf"])
        return self.rng.choice([f"{number(kn, 3)} kN", f"{number(kn, 3)} kN", f"{number(kn * 1000, 3)} N"])

    def line(self, knm):
        if self.us:
            return self.rng.choice([f"{number(knm / 14.594, 3)} kip/ft", f"{number(knm / 14.594 * 1000, 3)} lbf/ft"])
        return self.rng.choice([f"{number(knm, 3)} kN/m", f"{number(knm, 3)} N/mm"])

    def moment(self, knm):
        if self.us:
            return self.rng.choice([f"{number(knm / 1.3558, 3)} kip·ft", f"{number(knm / 1.3558 * 12, 3)} kip*in"])
        return self.rng.choice([f"{number(knm, 3)} kN·m", f"{number(knm, 3)} kN.m", f"{number(knm, 3)} kNm"])

    def warmth(self, k):
        return f"{number(k * 1.8, 2)} degF" if self.us else f"{number(k, 2)} K"


class Draw:
    def __init__(self, seed, full, family, us):
        self.rng = random.Random(seed)
        self.full, self.family, self.us = full, family, us
        self.u = Units(self.rng, us)
        self.nodes, self.members, self.supports = {}, [], {}
        self.sections, self.loads = {}, []

    # -------------------------------------------------- shapes

    def rectangle(self, s):
        return f"shape: rectangle, depth: {self.u.small(0.24 * s)}, width: {self.u.small(0.12 * s)}"

    def round(self, s):
        return f"shape: round, diameter: {self.u.small(0.09 * s)}"

    def tube(self, s):
        return f"shape: tube, diameter: {self.u.small(0.1683 * s)}, wall: {self.u.small(0.0071 * s)}"

    def box(self, s):
        t = 0.008 * s
        radii = f", outer_radius: {self.u.small(1.5 * t)}, inner_radius: {self.u.small(t)}" if self.rng.random() < 0.6 else ""
        return f"shape: box, depth: {self.u.small(0.16 * s)}, width: {self.u.small(0.12 * s)}, wall: {self.u.small(t)}{radii}"

    def i(self, s):
        fillet = f", fillet: {self.u.small(0.012 * s)}" if self.rng.random() < 0.6 else ""
        return f"shape: i, depth: {self.u.small(0.24 * s)}, width: {self.u.small(0.13 * s)}, web: {self.u.small(0.0066 * s)}, flange: {self.u.small(0.0102 * s)}{fillet}"

    def channel(self, s):
        fillet = f", fillet: {self.u.small(0.01 * s)}" if self.rng.random() < 0.6 else ""
        return f"shape: channel, depth: {self.u.small(0.22 * s)}, width: {self.u.small(0.08 * s)}, web: {self.u.small(0.009 * s)}, flange: {self.u.small(0.0125 * s)}{fillet}"

    def tee(self, s):
        fillet = f", fillet: {self.u.small(0.011 * s)}" if self.rng.random() < 0.6 else ""
        return f"shape: tee, depth: {self.u.small(0.16 * s)}, width: {self.u.small(0.18 * s)}, web: {self.u.small(0.009 * s)}, flange: {self.u.small(0.014 * s)}{fillet}"

    def angle(self, s):
        return f"shape: angle, depth: {self.u.small(0.15 * s)}, width: {self.u.small(0.1 * s)}, thickness: {self.u.small(0.012 * s)}"

    def plates(self, s):
        a, b = self.u.small(0.012 * s), self.u.small(0.018 * s)
        return (f"shape: plates, plates: [{{width: {self.u.small(0.15 * s)}, height: {a}, at: {self.u.small(0.106 * s)}}}, "
                f"{{width: {self.u.small(0.008 * s)}, height: {self.u.small(0.2 * s)}, at: 0}}, "
                f"{{width: {self.u.small(0.11 * s)}, height: {b}, at: {self.u.small(-0.109 * s)}}}]")

    def given(self, s):
        a, i, m, d = 5.3e-3 * s**2, 5.7e-5 * s**4, 0.6e-5 * s**4, 0.13 * s
        if self.us:
            return (f"shape: given, area: {number(a / 0.0254**2)} in2, inertia: {number(i / 0.0254**4)} in4, top: {self.u.small(d)}, "
                    f"bottom: {self.u.small(0.8 * d)}, minor_inertia: {number(m / 0.0254**4)} in^4")
        return (f"shape: given, area: {number(a * 1e4)} cm2, inertia: {number(i * 1e8)} cm⁴, top: {self.u.small(d)}, "
                f"bottom: {self.u.small(0.8 * d)}, minor_inertia: {number(m * 1e8)} cm^4")

    SIMPLE = ("rectangle", "round", "tube", "box", "i", "given")
    ALL = SIMPLE + ("channel", "tee", "angle", "plates")

    def section(self, scale, shear=True):
        name = f"S{len(self.sections) + 1}"
        shape = self.queue.pop() if self.queue else self.rng.choice(self.ALL if self.full else self.SIMPLE)
        text = getattr(self, shape)(scale * self.rng.uniform(0.85, 1.2))
        if self.full and shape != "given" and self.rng.random() < 0.2:
            text += ", turned: true"
        if self.full and shear and self.shear and self.rng.random() < 0.6:
            area = 1.6e-3 * scale**2
            text += f", shear_area: {number(area / 0.0254**2, 3)} in2" if self.us else f", shear_area: {number(area * 1e6, 3)} mm2"
        self.sections[name] = text
        return name

    # -------------------------------------------------- structures

    def node(self, name, x, y):
        self.nodes[name] = (round(x, 3), round(y, 3))
        return name

    def member(self, a, b, kind, section, **extra):
        name = f"M{len(self.members) + 1}"
        if self.rng.random() < 0.25:
            a, b = b, a
        self.members.append({"name": name, "a": a, "b": b, "kind": kind, "section": section, **extra})
        return name

    def jitter(self, size=0.3):
        return self.rng.uniform(-size, size) if self.full else 0.0

    def family_continuous(self):
        kind = "beam" if self.family.endswith("beam") else "frame"
        rng, x = self.rng, 0.0
        count = rng.randint(2, 4)
        s = [self.section(1.3) for _ in range(2)]
        names = [self.node("A", 0, 0)]
        for i in range(count):
            x += rng.uniform(2.5, 7)
            names.append(self.node("BCDEFGH"[i], x, 0))
            self.member(names[-2], names[-1], kind, rng.choice(s))
        if rng.random() < 0.5:
            names.append(self.node("Z", x + rng.uniform(0.8, 1.8), 0))
            self.member(names[-2], names[-1], kind, s[0])
        first = rng.choice(["fixed", "pinned"])
        self.supports[names[0]] = first
        for n in names[1:]:
            if n != "Z":
                self.supports[n] = "{hold: [x, y]}" if kind == "beam" and rng.random() < 0.5 else "{hold: [y]}"

    def family_grid(self):
        rng = self.rng
        bays, storeys = (1, 1) if self.family == "portal" else rng.choice([(2, 1), (1, 2), (2, 2)])
        column, beam = self.section(1.0), self.section(1.3)
        xs, ys = [0.0], [0.0]
        for _ in range(bays):
            xs.append(xs[-1] + rng.uniform(3.5, 7))
        for _ in range(storeys):
            ys.append(ys[-1] + rng.uniform(2.8, 4.5))
        for j, y in enumerate(ys):
            for i, x in enumerate(xs):
                self.node(f"{'PQRS'[j]}{i}", x + (self.jitter() if j else 0), y + (self.jitter() if j else 0))
        for j in range(storeys):
            for i in range(bays + 1):
                self.member(f"{'PQRS'[j]}{i}", f"{'PQRS'[j + 1]}{i}", "frame", column)
        for j in range(1, storeys + 1):
            for i in range(bays):
                self.member(f"{'PQRS'[j]}{i}", f"{'PQRS'[j]}{i + 1}", "frame", beam)
        for i in range(bays + 1):
            self.supports[f"P{i}"] = rng.choice(["fixed", "fixed", "pinned"])

    def family_gable(self):
        rng = self.rng
        w, h, f = rng.uniform(7, 14), rng.uniform(3, 5), rng.uniform(0.8, 2.5)
        s, r = self.section(1.2), self.section(1.2)
        ridge = w * rng.uniform(0.35, 0.65)
        for n, x, y in (("A", 0, 0), ("B", self.jitter(), h), ("C", ridge, h + f), ("D", w + self.jitter(), h * rng.uniform(0.8, 1)), ("E", w, 0)):
            self.node(n, x, y)
        for a, b, k in (("A", "B", s), ("B", "C", r), ("C", "D", r), ("D", "E", s)):
            self.member(a, b, "frame", k)
        self.supports = {"A": rng.choice(["fixed", "pinned"]), "E": rng.choice(["fixed", "pinned"])}

    def family_truss(self):
        rng = self.rng
        panels = rng.randint(3, 5)
        panel, depth = rng.uniform(1.8, 3), rng.uniform(1.2, 2.2)
        chord, web = self.section(0.75, False), self.section(0.55, False)
        bottom = [self.node(f"L{i}", i * panel, self.jitter(0.15) if 0 < i < panels else 0) for i in range(panels + 1)]
        warren = rng.random() < 0.5
        kind = lambda: "bar3" if self.full and rng.random() < 0.2 else "bar"
        if warren:
            top = [self.node(f"U{i}", (i + 0.5) * panel, depth + self.jitter(0.15)) for i in range(panels)]
        else:
            top = [self.node(f"U{i}", i * panel, depth + self.jitter(0.15)) for i in range(panels + 1)]
        for chain in (bottom, top):
            for a, b in zip(chain, chain[1:]):
                self.member(a, b, kind(), chord)
        for i in range(len(top)):
            self.member(bottom[i], top[i], kind(), web)
            if i + 1 < len(bottom):
                self.member(bottom[i + 1], top[i], kind(), web)
        if not warren and rng.random() < 0.5:  # a second diagonal, one bar more than statics needs
            self.member(bottom[1], top[2], "bar", web)
        self.supports = {bottom[0]: "pinned", bottom[-1]: "{hold: [y]}"}
        if rng.random() < 0.3:
            self.supports[bottom[len(bottom) // 2]] = "{hold: [y]}"

    def family_trussed(self):
        """A beam with a post and ties below it."""
        rng = self.rng
        w, h = rng.uniform(6, 10), rng.uniform(0.8, 1.6)
        beam, bar = self.section(1.1), self.section(0.45, False)
        a, b, c, d = (self.node(n, x, y) for n, x, y in (("A", 0, 0), ("B", w * rng.uniform(0.4, 0.6), self.jitter(0.1)), ("C", w, 0), ("D", w / 2, -h)))
        self.member(a, b, "frame", beam)
        self.member(b, c, "frame", beam)
        self.member(b, d, rng.choice(["bar", "bar3"]), bar)
        self.member(a, d, "bar", bar)
        self.member(d, c, rng.choice(["bar", "bar3"]), bar)
        self.supports = {"A": "pinned", "C": "{hold: [y]}"}

    def family_stayed(self):
        """A cantilever, a stay to a wall, a hanger with something at its foot."""
        rng = self.rng
        L, h = rng.uniform(3, 5), rng.uniform(1.5, 3)
        beam, bar = self.section(1.0), self.section(0.4, False)
        self.node("W", 0, 0), self.node("T", 0, h), self.node("P", L * 0.6, self.jitter()), self.node("Q", L, self.jitter()), self.node("F", L, -rng.uniform(1.5, 3))
        self.nodes["F"] = (self.nodes["Q"][0], self.nodes["F"][1])
        self.member("W", "P", "frame", beam)
        self.member("P", "Q", "frame", beam)
        self.member("T", "P", rng.choice(["bar", "bar3"]), bar)
        self.member("Q", "F", "bar3", bar)
        self.supports = {"W": rng.choice(["fixed", "pinned"]), "T": "pinned", "F": "{hold: [x]}"}

    def family_hangers(self):
        rng = self.rng
        bars = self.section(0.4, False), self.section(0.4, False)
        h = rng.uniform(2, 4)
        self.node("J", 0, 0)
        for i, x in enumerate((-rng.uniform(1, 3), self.jitter(0.5), rng.uniform(1, 3))):
            self.node(f"T{i}", x, h + self.jitter(0.4))
            self.member(f"T{i}", "J", "bar3" if i == 1 or rng.random() < 0.5 else "bar", bars[i % 2])
            self.supports[f"T{i}"] = "pinned"

    def family_braced(self):
        """A frame of one bay with two tension-only diagonals, hinged beams."""
        rng = self.rng
        w, h = rng.uniform(3.5, 6), rng.uniform(2.8, 4)
        column, beam, rod = self.section(0.9), self.section(1.1), self.section(0.25, False)
        for n, x, y in (("A", 0, 0), ("B", self.jitter(0.2), h), ("C", w + self.jitter(0.2), h + self.jitter(0.2)), ("D", w, 0)):
            self.node(n, x, y)
        self.member("A", "B", "frame", column)
        self.member("B", "C", "frame", beam, hinge=rng.choice(["both", "start"]))
        self.member("D", "C", "frame", column)
        self.member("A", "C", "bar", rod, tension_only=True)
        self.member("D", "B", "bar", rod, tension_only=True)
        self.supports = {"A": "pinned", "D": "pinned"}

    # -------------------------------------------------- supports, hinges, loads

    def second_wave(self):
        rng, u = self.rng, self.u
        frames = [m for m in self.members if m["kind"] in ("frame", "beam")]
        if frames and rng.random() < 0.6:
            for m in rng.sample(frames, min(len(frames), rng.choice([1, 1, 2]))):
                m["hinge"] = rng.choice(["start", "end", "start", "end", "both"])
        beams_only = all(m["kind"] == "beam" for m in self.members)
        self.settling = []
        for n, text in list(self.supports.items()):
            axes = {"fixed": ["x", "y", "r"], "pinned": ["x", "y"]}.get(text) or text[text.index("[") + 1:text.index("]")].split(", ")
            spring, turned = {}, ""
            for a in list(axes):
                if rng.random() < 0.25 and len(axes) > 1:
                    axes.remove(a)
                    spring[a] = (f"{number(rng.uniform(2000, 20000), 3)} kip·ft/rad" if self.us else f"{number(rng.uniform(3000, 30000), 3)} kN·m/rad") if a == "r" \
                        else (f"{number(rng.uniform(20, 200), 3)} kip/in" if self.us else f"{number(rng.uniform(4, 40), 3)} kN/mm")
            if rng.random() < 0.3 and not beams_only:
                turned = f", turned: {round(rng.uniform(-40, 40), 1):g} deg"
            self.settling += [(n, a) for a in axes + list(spring)]
            if spring or turned:
                text = f"{{hold: [{', '.join(axes)}]"
                if spring:
                    text += ", spring: {" + ", ".join(f"{a}: {t}" for a, t in spring.items()) + "}"
                self.supports[n] = text + turned + "}"

    def length(self, m):
        (x0, y0), (x1, y1) = self.nodes[m["a"]], self.nodes[m["b"]]
        return math.hypot(x1 - x0, y1 - y0)

    def place(self, m, lo=0.1, hi=0.9):
        t = self.rng.uniform(lo, hi)
        if self.full and self.rng.random() < 0.4:
            return f"{round(t * 100):d} %"
        return self.u.span(t * self.length(m))

    def directions(self, m):
        if m["kind"] == "beam":
            return ["Y", "y"]
        return ["X", "Y", "x", "y", "Y"]

    def one_load(self, kinds):
        rng, u = self.rng, self.u
        kind = rng.choice(kinds)
        m = rng.choice(self.members)
        sign = rng.choice([-1, -1, -1, 1])
        light = 0.3 if m["kind"] in ("bar", "bar3") else 1.0
        free = [n for n in self.nodes if n not in self.supports]
        if kind == "node" and free:
            n = rng.choice(free)
            parts = []
            joined = [q for q in self.members if n in (q["a"], q["b"])]
            if all(q["kind"] == "beam" for q in joined):
                parts = [f"fy: {u.force(sign * rng.uniform(2, 25))}"]
            else:
                parts = [f"fx: {u.force(rng.uniform(-12, 12))}", f"fy: {u.force(sign * rng.uniform(2, 25))}"]
            if any(q["kind"] in ("frame", "beam") and "hinge" not in q for q in joined) and rng.random() < 0.4:
                parts.append(f"m: {u.moment(rng.uniform(-8, 8))}")
            return f"- {{at: {n}, {', '.join(parts)}}}"
        if kind == "uniform":
            d = rng.choice(self.directions(m))
            if rng.random() < 0.3:
                same = [q["name"] for q in self.members if q["kind"] == m["kind"]]
                names = rng.sample(same, min(len(same), 3))
                return f"- {{on: [{', '.join(names)}], dir: {d}, w: {u.line(sign * rng.uniform(0.5, 6) * light)}}}"
            return f"- {{on: {m['name']}, dir: {d}, w: {u.line(sign * rng.uniform(1, 12) * light)}}}"
        if kind == "point":
            d = rng.choice(self.directions(m))
            if m["kind"] == "bar3":
                d = "y"  # along a bar3 only uniform loads, where element and statics agree
            at = "100 %" if self.full and rng.random() < 0.1 else self.place(m)
            return f"- {{on: {m['name']}, dir: {d}, p: {u.force(sign * rng.uniform(2, 20) * light)}, at: {at}}}"
        if kind == "couple":
            return f"- {{on: {m['name']}, m: {u.moment(rng.uniform(-9, 9) * light)}, at: {self.place(m)}}}"
        if kind in ("partial", "linear", "plan"):
            d = rng.choice(["y"] if m["kind"] == "bar3" else self.directions(m))
            if kind == "plan":
                if m["kind"] == "bar3":
                    d = rng.choice(["X", "Y"])
                return f"- {{on: {m['name']}, dir: {d}, w: {u.line(sign * rng.uniform(1, 9) * light)}, per: plan}}"
            over = ""
            if kind == "partial":
                a, b = sorted((rng.uniform(0, 0.45), rng.uniform(0.55, 1)))
                L = self.length(m)
                over = f", over: [{u.span(a * L)}, {u.span(b * L * 0.999 - 0.02)}]"
            w = u.line(sign * rng.uniform(1, 12) * light)
            if kind == "linear" or rng.random() < 0.5:
                w = f"[{w}, {u.line(rng.choice([-1, -1, 1]) * rng.uniform(0, 10) * light)}]"
            return f"- {{on: {m['name']}, dir: {d}, w: {w}{over}}}"
        if kind == "warm":
            names = rng.sample([q["name"] for q in self.members], min(len(self.members), rng.randint(1, 4)))
            return f"- {{on: [{', '.join(names)}], warm: {u.warmth(rng.uniform(-25, 35))}}}"
        if kind == "gradient":
            return f"- {{on: {m['name']}, warm: {{top: {u.warmth(rng.uniform(-10, 30))}, bottom: {u.warmth(rng.uniform(-10, 20))}}}}}"
        if kind == "misfit":
            return f"- {{on: {m['name']}, too_long: {u.small(rng.uniform(-0.003, 0.003))}}}"
        if kind == "settle" and getattr(self, "settling", None):
            n, a = rng.choice(self.settling)
            value = f"{round(rng.uniform(-0.15, 0.15), 2):g} deg" if a == "r" else u.small(rng.uniform(-0.006, 0.006))
            return f"- {{settle: {n}, {a}: {value}}}"
        return self.one_load(["uniform"])

    def rename(self):
        """Names that a careless reader of YAML takes for numbers and truth values."""
        new = dict(zip(self.nodes, ("1", "10", "no", "1e3", "y", "on", "007", "off", "1_0", "2e0", "yes", "3-4", "0x1f", "N", "true")))
        self.nodes = {new[n]: xy for n, xy in self.nodes.items()}
        self.supports = {new[n]: t for n, t in self.supports.items()}
        for m in self.members:
            m["a"], m["b"] = new[m["a"]], new[m["b"]]
        self.settling = [(new[n], a) for n, a in getattr(self, "settling", [])]

    # -------------------------------------------------- the file

    def build(self):
        rng, u = self.rng, self.u
        self.shear = rng.random() < 0.5
        self.queue = list(self.want)
        getattr(self, "family_" + {"continuous-beam": "continuous", "continuous-frame": "continuous", "portal": "grid", "grid": "grid"}.get(self.family, self.family))()
        if self.full:
            self.second_wave()
        if self.number % 7 == 0:
            self.rename()
        title = f"{'Full' if self.full else 'Basic'} language, {self.family.replace('-', ' ')}"
        out = ["calcsheaf: 1", "", "project:", f"  title: {title}", "  basis:",
               "    - {mark: R1, text: Limits drawn at random}", "", "display:", f"  system: {'us' if self.us else 'metric'}", ""]
        out += ["materials:"]
        e = rng.choice(["29000 ksi", "10000 ksi"]) if self.us else rng.choice(["210 GPa", "210 GPa", "70 GPa", "205000 MPa"])
        shear = {"29000 ksi": "11200 ksi", "10000 ksi": "3800 ksi", "70 GPa": "26 GPa"}.get(e, "80 GPa")
        g = f", G: {shear}" if self.full and self.shear else ""
        density = rng.choice(["490 lb/ft3", "490 lbf/ft3"] if self.us else ["7850 kg/m3", "78.5 kN/m3"])
        alpha = "6.5e-6 /degF" if self.us else "12e-6 /K"
        limit = ("24 ksi", "22 ksi", "14 ksi") if self.us else ("165 MPa", "150 MPa", "95 MPa")
        out += [f"  steel: {{E: {e}{g}, density: {density}{', expansion: ' + alpha if self.full else ''}, "
                f"allowable: {{tension: {limit[0]}, compression: {limit[1]}, source: R1}}}}", "", "sections:"]
        out += [f"  {k}: {{{t}}}" for k, t in self.sections.items()]
        # the coordinates are written first, and loads drawn on what was written
        out += ["", "nodes:"]
        for n, (x, y) in self.nodes.items():
            out.append(f"  {n}: {{x: {'0' if x == 0 else u.span(x)}, y: {'0' if y == 0 else u.span(y)}}}")
        out += ["", "supports:"] + [f"  {n}: {t}" for n, t in self.supports.items()]
        out += ["", "members:"]
        for m in self.members:
            extra = "".join(f", {k}: {str(m[k]).lower()}" for k in ("hinge", "tension_only") if k in m)
            if self.checked and m["kind"] != "beam":
                k = rng.choice(["1.0", "0.8", "1.3"])
                extra += f", effective_length: {{in_plane: {k}, out_of_plane: {rng.choice(['1.0', '0.5', u.span(2.4)])}}}"
            out.append(f"  {m['name']}: {{kind: {m['kind']}, from: {m['a']}, to: {m['b']}, section: {m['section']}, material: steel{extra}}}")
        kinds = ["node", "uniform", "point", "uniform", "point"]
        if self.full:
            kinds = ["node", "uniform", "point", "couple", "partial", "linear", "plan", "warm", "gradient", "misfit", "settle"]
        out += ["", "load_cases:"]
        cases = ["D", "L", "W", "T"][:rng.randint(2, 4)]
        rng.shuffle(kinds)
        deal = []
        for i, c in enumerate(cases):
            out.append(f"  {c}:")
            if i == 0 and rng.random() < 0.7:
                out.append(f"    self_weight: {rng.choice(['true', 'true', '1.1'])}")
            out.append("    loads:")
            for _ in range(rng.randint(2, 4)):
                if not deal:
                    deal = list(kinds)
                out.append("      " + self.one_load([deal.pop()] if rng.random() < 0.8 else kinds))
        if rng.random() < 0.85:
            out += ["", "combinations:"]
            for j in range(rng.randint(2, 3)):
                chosen = [c for c in cases if rng.random() < 0.8] or cases
                out.append(f"  C{j + 1}: {{factors: {{{', '.join(f'{c}: {rng.choice([1.0, 1.35, 1.5, 0.9, 1.2, -1.0])}' for c in chosen)}}}}}")
        if self.checked:
            out += ["", "checks:", "  stress: all", "  shear: off"]
            deflection = [m for m in self.members if m["kind"] in ("frame", "beam")]
            out.append("  deflection:")
            for m in deflection[:2]:
                out.append(f"    - {{member: {m['name']}, limit: L/{rng.choice([200, 250, 360])}}}")
            n = rng.choice([n for n in self.nodes if n not in self.supports] or list(self.nodes))
            out.append(f"    - {{node: {n}, dir: y, limit: {u.small(rng.uniform(0.005, 0.03))}}}")
            out += ["  buckling: {method: euler, safety: 1.92}", "  slenderness: 200", "  stability: {at_least: 3}"]
        else:
            out += ["", "checks:", "  shear: off"]
        return "\n".join(out) + "\n"


# ---------------------------------------------------------------- what is expected

def rounded(v):
    return float(f"{v:.{DIGITS - 1}e}")


def expected(text):
    """Results to twelve digits, noise set to nothing, and what cannot be told apart left out.

    Where an extreme is reached at two places (or with both signs) its place (or the value) is not compared.
    """
    doubts = {}
    full = independent.solve(text, doubts)
    result = independent.public(full)
    for c, r in result["combinations"].items():
        force = full["combinations"][c]["_scale"]
        lengths = [m["length"] for m in r["members"].values()]
        arm = max(lengths)
        size = {"disp": max([abs(d[a]) for d in r["displacements"].values() for a in "xy"] + [1e-12]),
                "turn": max([abs(d["r"]) for d in r["displacements"].values()] + [1e-12])}
        snap = lambda v, s: 0.0 if abs(v) < 1e-11 * s else rounded(v)
        for m in r["members"].values():
            for end in ("start", "end"):
                for k in list(m[end]):
                    force = max(force, abs(m[end][k]) / (arm if k == "m" else 1))
        for d in r["displacements"].values():
            for k in d:
                d[k] = snap(d[k], size["turn" if k == "r" else "disp"])
        for d in r["reactions"].values():
            for k in d:
                d[k] = snap(d[k], force * (arm if k == "r" else 1))
        r["equilibrium"] = {"x": 0.0, "y": 0.0, "moment": 0.0}
        if r["critical_load_factor"] is not None:
            r["critical_load_factor"] = float(f"{r['critical_load_factor']:.7g}")
        stress = max([abs(m["stress"][k]["value"]) for m in r["members"].values() if "stress" in m for k in ("largest_tension", "largest_compression")] + [1e-30])
        strain = max([abs(s.get("axial", 0)) for m in r["members"].values() for s in m["strain"].values()] + [1e-30])
        curvature = max([abs(s.get("curvature", 0)) for m in r["members"].values() for s in m["strain"].values()] + [1e-30])
        for name, m in r["members"].items():
            m["length"] = rounded(m["length"])
            for end in ("start", "end"):
                for k in m[end]:
                    m[end][k] = snap(m[end][k], force * (arm if k == "m" else 1))
                for k, v in m["strain"][end].items():
                    m["strain"][end][k] = snap(v, strain if k == "axial" else curvature)
                for k in m.get("stress", {}).get(end, {}):
                    m["stress"][end][k] = snap(m["stress"][end][k], stress)
            for key, letter, scale in (("peak_moment", "m", force * arm), ("peak_deflection", "v", size["disp"])):
                if key in m:
                    m[key] = {"x": rounded(m[key]["x"]), letter: snap(m[key][letter], scale)}
                    if m[key][letter] == 0.0:
                        m[key].pop("x")
            for key in ("largest_tension", "largest_compression"):
                if "stress" in m:
                    s = m["stress"][key]
                    m["stress"][key] = {"value": snap(s["value"], stress), "x": rounded(s["x"]), "fibre": s["fibre"]}
                    if m["stress"][key]["value"] == 0.0:
                        m["stress"][key] = {"value": 0.0}
        for path in doubts[c]:
            target = r["members"][path[0]]
            for k in path[1:-1]:
                target = target.get(k, {})
            target.pop(path[-1], None)
        for name in full["combinations"][c]["_slack"]:
            r["members"][name]["stress"]["largest_tension"].pop("x", None)
    for s in result["sections"].values():
        for k in s:
            s[k] = rounded(s[k])
    keep = []
    wanted = "slenderness:" in text
    for row in result["checks"]:
        if wanted and row["ratio"] is not None:
            for k in ("demand", "limit", "ratio"):
                row[k] = float(f"{row[k]:.7g}") if row["kind"] == "stability" else rounded(row[k])
            if row["demand"] > 1e-9 * (row["limit"] or 1):
                keep.append(row)
    result["checks"] = keep
    return result, full


def sound(text):
    """A structure worth keeping: solvable, not floppy, tension-only bars clearly tight or slack, below its critical load."""
    try:
        result, full = expected(text)
    except (independent.Refused, ValueError):
        return None
    job = independent.Job(text)
    for c, r in full["combinations"].items():
        if max(abs(d[a]) for d in r["displacements"].values() for a in "xy") > 0.25:
            return None
        if r["critical_load_factor"] is not None and not 1.1 < r["critical_load_factor"] < 5000:
            return None
        for m in job.members.values():
            if m.tension_only and m.name not in r["_slack"] and r["members"][m.name]["start"]["n"] < 1e-3 * r["_scale"]:
                return None
            if m.kind == "bar3":
                here, there = r["members"][m.name]["start"]["n"], r["members"][m.name]["_interpolated"][0]
                if abs(here - there) > 1e-9 * r["_scale"]:
                    return None
    return result


FAMILIES_BASIC = ["continuous-frame", "continuous-beam", "portal", "truss", "gable", "hangers", "trussed", "grid", "stayed", "truss", "continuous-beam", "grid"]
FAMILIES_FULL = ["portal", "truss", "continuous-beam", "gable", "braced", "hangers", "continuous-frame", "grid", "trussed", "stayed", "braced",
                 "truss", "portal", "continuous-beam", "gable", "grid", "hangers", "trussed", "continuous-frame", "stayed", "braced", "portal",
                 "truss", "gable", "grid", "continuous-frame", "braced", "stayed"]


def draw(name, number_, full, family, us):
    shapes = Draw.ALL if full else Draw.SIMPLE
    for attempt in range(400):
        d = Draw(f"calcsheaf {name} {attempt}", full, family, us)
        d.want = [shapes[number_ % len(shapes)], shapes[(number_ * 3 + 1) % len(shapes)]]
        d.checked = number_ % 2 == 0
        d.number = number_
        text = d.build()
        result = sound(text)
        if result is not None:
            return text, result, attempt
    raise SystemExit(f"{name}: nothing sound found")


def main():
    for full, families, prefix in ((False, FAMILIES_BASIC, "basic"), (True, FAMILIES_FULL, "random")):
        for i, family in enumerate(families, 1):
            name = f"{prefix}-{i:02d}"
            text, result, attempt = draw(name, i, full, family, us=i % 3 == 0)
            with open(os.path.join(HERE, name + ".yaml"), "w", encoding="utf-8") as out:
                out.write(text)
            with open(os.path.join(HERE, name + ".expected.json"), "w", encoding="utf-8") as out:
                json.dump(result, out, indent=1, ensure_ascii=False)
                out.write("\n")
            print(f"{name}: {family}, draw {attempt}")


def check():
    worst = 0
    for file in sorted(os.listdir(HERE)):
        if file.endswith(".yaml"):
            with open(os.path.join(HERE, file), encoding="utf-8") as f:
                result, _ = expected(f.read())
            with open(os.path.join(HERE, file.replace(".yaml", ".expected.json")), encoding="utf-8") as f:
                if json.load(f) != result:
                    worst += 1
                    print(f"{file}: differs")
    print("all as written" if not worst else f"{worst} differ (last digits may, with other library versions)")


if __name__ == "__main__":
    check() if "--check" in sys.argv else main()
