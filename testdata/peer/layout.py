"""Layouts worked out apart from the program: random jobs, their geometry, rooms and swings, held against its JSON.

    go build -o DIR/arrestcheck ./cmd/arrestcheck
    /usr/bin/python3 testdata/peer/layout.py DIR/arrestcheck [JOBS [SEED [KINDS]]]

KINDS are of plain, below, edge, retr, plain-path, below-path, edge-path, with commas. A job has exact figures and bands, in
meters or feet. What is printed over bands must hold every point tried here: the corners, the places where an anchor stands
right behind or above a position, and random points inside; it may be wider by 1e-6. Swings on a path are integrated event
by event (scipy, DOP853 at 1e-10). Differences are printed, with the job; those that are known:

- a swing in no plane for a part of the bands: the program's angle is that of the part in a plane (its rows are capped);
- "wider" where the connector just comes to the edge between two corners: the program goes there, the points here do not;
- swings that go on: the program follows some of them longer than is done here, and may find a later, harder pull;
- the upper end of clearance_left of a retractable, narrower than here by a millimeter or two where the two rooms cross
  between corners.
"""
import collections
import itertools
import json
import math
import os
import random
import subprocess
import sys
import tempfile

import numpy as np
from scipy.integrate import solve_ivp

G = 9.80665
FT, IN, LB, LBF = 0.3048, 0.0254, 0.45359237, 4.4482216152605


# ---------------------------------------------------------------- one exact point
class Out(Exception):
    pass


def place(c, p):
    """Geometry of one position. c: dict of SI figures; p: (along, out)."""
    zA, zD, L = c["zA"], c["zD"], c["L"]
    edge = c["edge"] != "none"
    yA = -c["behind"] if edge else 0.0
    x, y = p
    if edge and yA < 0 and zA < 0:
        raise Out("anchor in the structure")
    r = {"along": x, "out": y}
    lo, hi = 0.0, zD                       # heights at which the D-ring may be carried
    dz = max(0.0, zA - hi, lo - zA)
    All = L + c.get("slack", 0.0)
    r["reach"] = math.sqrt(All ** 2 - dz ** 2) if All >= dz else None
    if edge:
        r["edge_distance"] = math.hypot(x, yA)
        if yA < 0:
            held = r["reach"] is None or r["reach"] < r["edge_distance"]
        else:
            held = False
        if y < 0:
            y = 0.0
    else:
        held = False
    s = math.hypot(x, y - yA)
    r["offset"], r["start"] = s, (x, y, zD)
    r["alpha"] = math.atan2(s, zA - zD)
    r["held"] = held and p[1] < 0
    if r["held"]:
        r["known"] = False
        return r
    A = math.hypot(s, zA - zD)
    r["distance"] = A
    R = min(A + c["lock"], L) if "lock" in c else L + c["slack"]
    if A > (L if "lock" in c else R):
        r["known"] = False
        r["unreached"] = True
        return r
    r["known"] = True
    r["R"] = R

    def straight_clear(z):
        """The straight line from anchor to (y, z) keeps off the quarter y<0, z<0."""
        if not edge or yA >= 0:
            return True
        if z >= 0:
            return True
        if y <= 0:                          # just outside and below the surface: round the edge
            return False
        # height of the line over the edge y = 0
        return zA + (z - zA) * (0 - yA) / (y - yA) >= 0

    z = zA - math.sqrt(R * R - s * s)
    r["over"] = False
    if not straight_clear(z):
        b = math.hypot(yA, zA)
        d = math.sqrt(R * R - x * x) - b
        if d < abs(y):
            raise Out("does not come down")
        z = -math.sqrt(d * d - y * y)
        r["over"] = True
        r["b"], r["d"] = b, d
        if y == 0:
            r["pivot"] = (0.0, 0.0, b)
            r["rs"], r["ss"] = R, abs(x)
            r["plane"] = True
        else:
            r["pivot"] = (x, 0.0, 0.0)
            r["rs"], r["ss"] = d, y
            r["plane"] = abs(x) < 1e-12
    else:
        r["pivot"] = (0.0, yA, zA)
        r["rs"], r["ss"], r["plane"] = R, s, True
    r["taut"] = z
    h = zD - z
    r["h"] = h
    r["beta"] = math.asin(min(1.0, r["ss"] / r["rs"]))
    r["H"] = r["rs"] * (1 - math.cos(r["beta"]))
    r["lowest"] = -(R - r["b"]) if r["over"] else zA - R     # the connector at its full way, straight below
    r["H"] = z - r["lowest"]
    v = math.sqrt(c.get("u", 0.0) ** 2 + 2 * c["g"] * h)
    r["v"] = v
    r["vlow"] = math.sqrt(v * v * math.sin(r["beta"]) ** 2 + 2 * c["g"] * r["H"])
    r["vhigh"] = math.sqrt(v * v + 2 * c["g"] * r["H"])
    return r


# ---------------------------------------------------------------- the swing with a path, in time
class Path:
    """Elastic parts in series and one absorber of constant force."""

    def __init__(self, parts):
        self.c = 0.0
        self.Fa = None
        self.X = 0.0
        for q in parts:
            if q["part"] == "absorber":
                self.Fa, self.X = q["force"], q["travel"]
            else:
                self.c += 1.0 / q["k"]
        self.k = 1.0 / self.c


def swing_run(path, m, g, R, s, v0, back_at_once=True, seconds=None, watch=None):
    """From the first pull. u to the side of the pivot, w down. Returns a dict."""
    u, w = s, math.sqrt(R * R - s * s)
    y = np.array([u, w, 0.0, v0])
    q, t = 0.0, 0.0
    peak, tpeak = 0.0, 0.0
    lows = []
    back = None
    sliding = False
    exhausted = False
    limit = seconds or 60.0
    curve = []

    def ext(y):
        return math.hypot(y[0], y[1]) - R

    def rate(y):
        return (y[0] * y[2] + y[1] * y[3]) / math.hypot(y[0], y[1])

    tol = dict(method="DOP853", rtol=1e-10, atol=1e-11)
    for _ in range(4000):
        e = ext(y)
        mode = "slide" if sliding else ("free" if e < q - 1e-13 or (e <= q + 1e-12 and rate(y) <= 0) else "elastic")

        def f(t, y, mode=mode, q=q):
            if mode == "free":
                return [y[2], y[3], 0.0, g]
            r = math.hypot(y[0], y[1])
            F = path.Fa if mode == "slide" else path.k * (r - R - q)
            a = F / (m * r)
            return [y[2], y[3], -a * y[0], g - a * y[1]]

        ev = []

        def add(fn, direction, terminal=True):
            fn.direction, fn.terminal = direction, terminal
            ev.append(fn)
            return len(ev) - 1

        i_low = add(lambda t, y: y[3], -1, False)
        i_back = add(lambda t, y: y[2], 1, True)
        i_turn = add(lambda t, y: y[0] * y[2] + y[1] * y[3], -1, mode == "slide" or back is not None)
        i_catch = i_slack = i_give = i_used = i_rise = None
        if mode == "free":
            i_catch = add(lambda t, y, q=q: math.hypot(y[0], y[1]) - R - q, 1)
        elif mode == "elastic":
            i_slack = add(lambda t, y, q=q: math.hypot(y[0], y[1]) - R - q, -1)
            if path.Fa is not None and q < path.X - 1e-12:
                i_give = add(lambda t, y, q=q: path.k * (math.hypot(y[0], y[1]) - R - q) - path.Fa, 1)
        else:
            i_used = add(lambda t, y: math.hypot(y[0], y[1]) - R - path.Fa / path.k - path.X, 1)
        if back is not None:
            i_rise = add(lambda t, y: y[3], -1)
        # Force and turning are looked for step by step: short ones, so that none is stepped over.
        sol = solve_ivp(f, (t, limit), y, events=ev, max_step=np.inf if mode == "free" else 4e-3, **tol)
        for at, when in zip(sol.y_events[i_low], sol.t_events[i_low]):
            lows.append((at[1], math.hypot(at[2], at[3]), when, at[0]))
        if watch is not None:
            curve.extend(zip(sol.t, sol.y.T))

        def force(yy):
            if mode == "free":
                return 0.0
            return path.Fa if mode == "slide" else path.k * max(0.0, ext(yy) - q)
        cand = list(zip(sol.t, sol.y.T)) if mode != "elastic" else [(sol.t[0], sol.y[:, 0]), (sol.t[-1], sol.y[:, -1])]
        cand += list(zip(sol.t_events[i_turn], sol.y_events[i_turn]))
        for when, yy in cand:
            F = force(yy)
            if F > peak:
                peak, tpeak = F, when
        t, y = sol.t[-1], sol.y[:, -1]
        if sol.status == 0:
            break
        hit = lambda i: i is not None and len(sol.t_events[i]) and abs(sol.t_events[i][-1] - t) < 1e-14
        if mode == "slide":
            if hit(i_used):
                q, sliding, exhausted = path.X, False, True
            elif hit(i_turn):
                q, sliding = ext(y) - path.Fa / path.k, False
        elif hit(i_give):
            sliding = True
        if hit(i_back) and back is None:
            back = t
        if hit(i_slack) or hit(i_catch):
            # step off the boundary
            pass
        if back is not None and seconds is None:
            rr, down = y[0] * y[2] + y[1] * y[3], y[3]
            if (rr <= 1e-9 or (mode == "free")) and down <= 1e-9:
                if rr <= 1e-9:
                    break
        # leave an event's zero by a tiny step, so that it is not found again
        dt = 1e-10
        y = y + dt * np.array(f(t, y))
        t += dt
    low = max(lows) if lows else None
    return {"peak": peak, "tpeak": tpeak, "lows": lows, "low": low, "back": back, "exhausted": exhausted, "q": q,
            "curve": curve, "t": t}


def straight_run(path, m, g, v):
    """Straight down: by energy alone. Peak and travel to the first rest."""
    W, k = m * g, path.k
    peak = W + math.sqrt(W * W + k * m * v * v)
    if path.Fa is None or peak <= path.Fa:
        return {"peak": peak, "low": (peak / k, 0.0), "exhausted": False}
    Fa = path.Fa
    left = m * v * v / 2 + W * Fa / k - Fa * Fa / (2 * k)
    if Fa > W and left / (Fa - W) <= path.X:
        return {"peak": Fa, "low": (Fa / k + left / (Fa - W), 0.0), "exhausted": False}
    left -= (Fa - W) * path.X
    # from Fa on the elastic parts alone: left = (F - W)^2/(2 k) - (Fa - W)^2/(2 k)
    F = W + math.sqrt((Fa - W) ** 2 + 2 * k * left)
    return {"peak": F, "low": (path.X + F / k, 0.0), "exhausted": True}


# ---------------------------------------------------------------- clearance
ITEMS = ("dec", "line", "harness", "give", "margin")
INCLUDABLE = {"line_stretch": "line", "harness_stretch": "harness", "anchor_give": "give"}


def room(c, r, dec, dec_inc):
    """(feet, anchor): each (sum, missing) for travel dec with what it includes."""
    inc = set(dec_inc) | set(c.get("margin_inc", ()))
    miss, tot = [], 0.0
    for i in ITEMS:
        have = dec if i == "dec" else c.get(i)
        if have is None:
            if i not in inc:
                miss.append(i)
        elif i in inc:
            if i != "line" or dec_inc != ["line"]:
                raise Out("twice " + i)
            # the travel of a path holds the stretch that was typed as well
        else:
            tot += have
    feet = (r["h"] + r["H"] + tot, list(miss))
    df = c.get("df")
    # below the anchor: how far the lowest point hangs below it, and the body
    depth = c["zA"] - r["lowest"]
    anchor = (depth + tot + (df or 0.0), miss + ([] if df else ["df"]))
    return feet, anchor


# ---------------------------------------------------------------- random jobs
UNITS = {"m": 1.0, "cm": 0.01, "mm": 0.001, "ft": FT, "in": IN}


def fmt(x, n=3):
    t = ("%.*f" % (n, x)).rstrip("0").rstrip(".")
    return "0" if t in ("-0", "") else t


NONNEG = {"slack", "line", "harness", "give", "margin"}


class Gen:
    def __init__(self, rng):
        self.r = rng
        self.figs = {}          # key -> (low, high) SI
        self.open = set()
        self.us = rng.random() < 0.4
        self.bands = 0

    def q(self, key, lo, hi, band=0.0, zero=False, signed=False, unit=None, source="measured"):
        r = self.r
        unit = unit or ("ft" if self.us else "m")
        f = UNITS[unit]
        n = 2 if unit in ("ft", "m") else 1
        x = round(r.uniform(lo, hi) / f, n)
        if zero:
            x = 0.0
        st = r.random()
        opened = self.p_open > r.random()
        if opened:
            w = fmt(x, n)
            text, rng2 = "%s %s" % (w, unit), (float(w), float(w))
            if float(w) == 0:
                opened = False      # a sourced exact zero is settled
            if r.random() < 0.3:
                source, opened = "assumed", True
            src = source
        elif band and self.bands < self.maxbands and r.random() < self.p_band:
            self.bands += 1
            e = max(round(band * r.uniform(0.3, 1) / f, n), 10.0 ** -n)
            if key in NONNEG and x - e < 0:
                x = e
            if r.random() < 0.5:
                text = "%s %s .. %s %s" % (fmt(x - e, n), unit, fmt(x + e, n), unit)
                rng2 = (float(fmt(x - e, n)), float(fmt(x + e, n)))
            else:
                text = "%s %s ± %s %s" % (fmt(x, n), unit, fmt(e, n), unit)
                rng2 = (float(fmt(x, n)) - float(fmt(e, n)), float(fmt(x, n)) + float(fmt(e, n)))
            src = source
        else:
            w = fmt(x, n)
            text, rng2 = "%s %s ± 0 %s" % (w, unit, unit), (float(w), float(w))
            src = source
        if opened:
            self.open.add(key)
        self.figs[key] = (rng2[0] * f, rng2[1] * f)
        return '{ value = "%s", source = "%s" }' % (text, src)


def job(rng, kind):
    g = Gen(rng)
    r = rng
    path = "path" in kind
    g.p_open = r.choice([0, 0, 0, 0.1])
    g.p_band = r.choice([0, 0.3, 0.6])
    g.maxbands = 2 if path else 6
    edge = "edge" in kind
    J = {"gen": g, "figs": g.figs, "kind": kind}
    out = ['format = "arrestcheck job 1"', '[document]', 'title = "t"', 'rescue = "ladder at hand"', '[worker]']
    m = r.randint(60, 130)
    if g.us:
        m = r.randint(130, 300)
        out.append('mass = { value = "%d lb ± 0 lb", source = "measured" }' % m)
        J["m"] = m * LB
    else:
        out.append('mass = { value = "%d kg ± 0 kg", source = "measured" }' % m)
        J["m"] = float(m)
    out.append('tools = { value = "0 kg", source = "measured" }')
    u = 0.0
    if not path and r.random() < 0.15:
        u = round(r.uniform(0.2, 1.5), 1)
        out += ['[fall]', 'initial_speed = { value = "%s m/s ± 0 m/s", source = "measured" }' % u]
    J["u"] = u
    J["edge"] = "none"
    lay = ['[layout]']
    retr = "retr" in kind
    L = r.uniform(1.2, 2.6) if not retr else r.uniform(4, 12)
    zD = r.uniform(1.1, 1.6)
    npos = r.choice([1, 1, 1, 2, 3])
    if edge:
        J["edge"] = r.choice(["round", "sharp"])
        lay.append('edge = "%s"' % J["edge"])
        sign = r.choice([1, 1, 1, 1, -1, 0])
        if sign > 0:
            behind = r.uniform(0.2, 0.6 * L if not retr else 2)
            zA = r.choice([0, r.uniform(0, 1.2), r.uniform(1.2, 2.4)])
        else:
            behind = -r.uniform(0.2, 0.8) if sign else 0.0
            zA = r.uniform(0.0, 2.5)
        lay.append("anchor_behind_edge = " + g.q("behind", behind, behind, 0.05, zero=(behind == 0)))
        J["rated_edge"] = r.random() < 0.5
        if J["rated_edge"]:
            lay.append('edge_rated_by = "manual"')
    else:
        lay.append('edge = "none"')
        behind = 0.0
        if "below" in kind:
            zA = r.uniform(-0.5, 1.0)
        elif retr:
            zA = r.uniform(2, 6)
        else:
            zA = zD + r.uniform(-0.2, 0.75) * L
    lay.append("anchor_height = " + g.q("zA", zA, zA, 0.1, zero=(zA == 0)))
    lay.append("d_ring_height = " + g.q("zD", zD, zD, 0.1))
    lay.append("connector_length = " + g.q("L", L, L, 0.1))
    J["df"] = r.random() < 0.75
    if J["df"]:
        lay.append("d_ring_to_feet = " + g.q("df", 1.2, 1.9, 0.1))
    J["hw"] = r.random() < 0.7
    if J["hw"]:
        lay.append("half_width = " + g.q("hw", 0.2, 0.5))
    if retr:
        lay.append("travel_before_locking = " + g.q("lock", 0.1, 0.8, 0.1))
    else:
        z = r.random() < 0.5
        lay.append("slack = " + g.q("slack", 0.05, 0.4, 0.05, zero=z))
    J["retr"] = retr
    out += lay
    J["positions"] = npos
    for i in range(npos):
        out.append('[[position]]')
        out.append('name = "p%d"' % (i + 1))
        onx = r.random() < 0.3
        ax = 0.0 if onx else r.uniform(-0.7, 0.7) * (L if not retr else 2)
        ay = 0.0
        if edge:
            ay = r.choice([0, 0, r.uniform(0.05, 0.5), -r.uniform(0.1, 1)])
        elif r.random() < 0.5:
            ay = r.uniform(-0.4, 0.4) * L if not retr else r.uniform(-1, 1)
        if not onx and r.random() < 0.2:
            ax = r.uniform(-0.05, 0.05)
        if ay and not edge and r.random() < 0.2:
            ay = r.uniform(-0.05, 0.05)
        out.append("along = " + g.q("x%d" % i, ax, ax, 0.08, zero=(ax == 0)))
        out.append("out = " + g.q("y%d" % i, ay, ay, 0.04 if abs(ay) > 0.1 else 0, zero=(ay == 0)))
    J["obst"] = []
    for i in range(r.choice([0, 1, 1, 2, 3]) if "noobst" not in kind else 0):
        out.append('[[obstacle]]')
        out.append('name = "o%d"' % (i + 1))
        t = r.choice(["level", "level", "box", "moving"])
        o = {"type": t, "h": False, "stop": False}
        depth = r.choice([r.uniform(3, 9), r.uniform(3, 9), r.uniform(0.5, 3)])
        out.append("below = " + g.q("ob%d" % i, depth, depth, 0.1))
        if t == "moving":
            out.append("moving = true")
        if t != "level" and r.random() < 0.5:
            o["h"] = True
            out.append("height = " + g.q("oh%d" % i, 0.2, 1.0))
        if t == "box":
            a = sorted([r.uniform(-3, 3), r.uniform(-3, 3)])
            b = sorted([r.uniform(-2, 2), r.uniform(-2, 2)])
            if edge:
                b = sorted([r.uniform(0, 2), r.uniform(0, 2)])
            out.append("along_from = " + g.q("oa%d" % i, a[0], a[0]))
            out.append("along_to = " + g.q("oA%d" % i, a[1] + .1, a[1] + .1))
            out.append("out_from = " + g.q("oo%d" % i, b[0], b[0]))
            out.append("out_to = " + g.q("oO%d" % i, b[1] + .1, b[1] + .1))
        if r.random() < 0.3:
            o["stop"] = True
            out.append("stop_over = " + g.q("os%d" % i, 0.02, 0.2))
        J["obst"].append(o)
    J["clear"] = r.random() < 0.85
    if J["clear"]:
        out.append('[clearance]')
        J["datum"] = r.choice(["feet", "anchor"])
        out.append('datum = "%s"' % J["datum"])
        J["dec"] = (not path) or r.random() < 0.3
        inc, minc = [], []
        words = {"line_stretch": "line", "harness_stretch": "harness", "anchor_give": "give"}
        if r.random() < 0.12 and not path:
            J["dec"] = False
        if J["dec"]:
            out.append("deceleration_distance = " + g.q("dec", 0.4, 1.4, 0.1))
        J["margin"] = r.random() < 0.9
        items = {}
        for w, k in words.items():
            a = r.random()
            if path and w == "line_stretch" and not J["dec"]:
                items[k] = False
                continue
            if a < 0.2 and J["dec"]:
                inc.append(w); items[k] = False
            elif a < 0.35 and J["margin"]:
                minc.append(w); items[k] = False
            elif a < 0.42:
                items[k] = False
            else:
                items[k] = True
                out.append("%s = " % w + g.q(k, 0.05, 0.4, 0.05))
        if J["margin"]:
            out.append("margin = " + g.q("margin", 0.3, 1, 0.1))
        if inc:
            out.append("deceleration_includes = " + json.dumps(inc))
        if minc:
            out.append("margin_includes = " + json.dumps(minc))
        J["inc"], J["minc"], J["items"] = inc, minc, items
    if path:
        J["path"] = []
        k = r.uniform(8, 60)
        out += ['[[connector]]', 'part = "webbing"', 'name = "web"', 'length = "%.2f m ± 0 m"' % 0.9,
                'stiffness = "%.1f kN/m ± 0 kN/m"' % k, 'source = "label"']
        J["path"].append({"part": "webbing", "k": float("%.1f" % k) * 1000})
        if r.random() < 0.6:
            Fa, X = r.uniform(2.5, 5), r.uniform(0.2, 1.5)
            out += ['[[connector]]', 'part = "absorber"', 'name = "pack"', 'deployment_force = "%.1f kN ± 0 kN"' % Fa,
                    'travel_at_most = "%.2f m ± 0 m"' % X, 'source = "label"']
            J["path"].append({"part": "absorber", "force": float("%.1f" % Fa) * 1000, "travel": float("%.2f" % X)})
        J["allow"] = r.choice([None, 0.1, 0.25])
        if J["allow"]:
            out += ['[model]', 'allowance = { value = "%d %%", source = "measured" }' % round(J["allow"] * 100)]
    J["text"] = out
    return J


# ---------------------------------------------------------------- program and peer side by side
def point(J, f):
    c = {"edge": J["edge"], "g": G, "u": J["u"], "m": J["m"]}
    for k in ("zA", "zD", "L", "slack", "lock", "behind", "df", "hw", "dec", "line", "harness", "give", "margin"):
        if k in f:
            c[k] = f[k]
    c["margin_inc"] = [dict(line_stretch="line", harness_stretch="harness", anchor_give="give")[w] for w in J.get("minc", [])]
    c["dec_inc"] = [dict(line_stretch="line", harness_stretch="harness", anchor_give="give")[w] for w in J.get("inc", [])]
    return c


def boxes(J, f, c):
    """Obstacles as (type, x1, x2, y1, y2, top, bottom)."""
    res = []
    for i, o in enumerate(J["obst"]):
        top = -f["ob%d" % i]
        bot = top - f["oh%d" % i] if o["h"] else None
        if o["type"] == "box":
            res.append(("box", f["oa%d" % i], f["oA%d" % i], f["oo%d" % i], f["oO%d" % i], top, bot))
        else:
            res.append((o["type"], None, None, None, None, top, bot))
    return res


def exact(J, f, sim=True):
    """All figures of one exact point: {(quantity, evidence): (low, high)} of the worst position."""
    c = point(J, f)
    P = [place(c, (f["x%d" % i], f["y%d" % i])) for i in range(J["positions"])]
    q = {}
    known = [p for p in P if p["known"]]
    E = {"places": P}
    if any(p.get("unreached") for p in P):
        raise Out("out of reach")
    q["offset_angle", "given"] = max(p["alpha"] for p in P)
    rr = [p["reach"] for p in P if p["reach"] is not None]
    if rr and J["edge"] != "none":
        q["restraint_reach", "given"] = max(rr)
    if known:
        q["free_fall", "given"] = max(p["h"] for p in known) + J["u"] ** 2 / (2 * G)
        q["fall_speed", "given"] = max(p["v"] for p in known)
        pl = [p for p in known if p["plane"]]
        q["swing_drop", "given"] = max(p["H"] for p in known)
        if pl:
            q["swing_angle", "given"] = max(p["beta"] for p in pl)
        sw = [p for p in pl if p["beta"] > 0]
        if sw:
            q["swing_speed", "shape"] = (max(p["vlow"] for p in pl), max(p["vhigh"] for p in pl))
        for ev in ("given", "modelled"):
            rooms = []
            for p in known:
                if ev == "given":
                    d, inc = c.get("dec"), c["dec_inc"]
                    if "path" in J and d is None:
                        rooms = []
                        break
                else:
                    if "path" not in J or not sim or not p["plane"]:
                        rooms = []
                        break
                    m = p.get("run") or model(J, c, p)
                    p["run"] = m
                    if m["low"] is None:
                        rooms = []
                        break
                    d, inc = p["pivot"][2] - m["low"][0], ["line"]
                    swung = [x["run"]["low"][1] for x in known if x.get("run")]
                    d = p["lowest"] - d
                    p["travel"] = d
                rooms.append((p, d) + room(c, p, d, inc))
            if not rooms:
                continue
            if ev == "modelled":
                q["peak_force", ev] = max(p["run"]["peak"] for p in known)
                if any(p["ss"] > 0 for p in known):
                    q["swing_speed", ev] = max(p["run"]["low"][1] for p in known)
            if rooms[0][1] is not None and (ev == "modelled" or all(p["beta"] == 0 for p in known)):
                q["total_fall_distance", ev] = max(p["h"] + p["H"] + d for p, d, a, b in rooms)
            if J["clear"]:
                k = 0 if J["datum"] == "feet" else 1
                q["clearance_needed", ev] = max((a, b)[k][0] for p, d, a, b in rooms)
                E["missing", ev] = sorted(set(sum([(a, b)[k][1] for p, d, a, b in rooms], [])))
                both = [(a[0] - c["zD"] * 0, b[0]) for p, d, a, b in rooms]
                E["rooms", ev] = [(p, d, a, b) for p, d, a, b in rooms]
            if J["clear"]:
                lefts = []
                for p, d, a, b in rooms:
                    feet, anchor = a[0], b[0] - c["zA"]
                    if not a[1] and not b[1]:
                        need = max(feet, anchor)
                    elif not a[1]:
                        need = feet
                    elif not b[1]:
                        need = anchor
                    else:
                        need = anchor if k else feet
                    if (a, b)[k][1]:
                        E["ceiling", ev] = True
                        need = max(need, anchor if k else feet)
                    for o in boxes(J, f, c):
                        if o[0] != "box" or in_the_way(c, p, o):
                            lefts.append(-o[5] - need)
                if lefts:
                    q["clearance_left", ev] = min(lefts)
    E["q"] = q
    return E


def in_the_way(c, p, o):
    """The plan of the swing, from the start to as far on the other side, against the box, the body as wide as it is."""
    if "hw" not in c or not p["plane"]:
        return True
    x, y, _ = p["start"]
    px, py, _ = p["pivot"]
    if p["over"] and y == 0:
        px, py = 0.0, 0.0
    h = c["hw"]
    t0, t1 = 0.0, 1.0
    for s, e, lo, hi in ((x, 2 * px - x, o[1] - h, o[2] + h), (y, 2 * py - y, o[3] - h, o[4] + h)):
        if s == e:
            if not lo <= s <= hi:
                return False
            continue
        a, b = sorted(((lo - s) / (e - s), (hi - s) / (e - s)))
        t0, t1 = max(t0, a), min(t1, b)
    return t0 <= t1


def model(J, c, p):
    path = Path(J["path"])
    if p["ss"] == 0:
        r = straight_run(path, c["m"], c["g"], p["v"])
        r["low"] = (p["rs"] + r["low"][0], 0.0)
        return r
    return swing_run(path, c["m"], c["g"], p["rs"], p["ss"], p["v"])


def prog(J, extra=()):
    text = "\n".join(J["text"] + list(extra)) + "\n"
    name = os.path.join(FOLDER, "job.toml")
    with open(name, "w") as f:
        f.write(text)
    r = subprocess.run([PROG, "check", "--format", "json", name], capture_output=True, text=True)
    return r, (json.loads(r.stdout) if r.stdout.strip() else None)


def samples(J, n, rng):
    keys = [k for k, (a, b) in J["figs"].items() if a != b]
    pts = []
    base = {k: v[0] for k, v in J["figs"].items()}
    if not keys:
        return [dict(base)], keys
    ends = []
    for k in keys:
        a, b = J["figs"][k]
        v = [a, b] + ([0.0] if a < 0 < b else [])
        if k == "behind":                # the anchor right behind, or above, a place
            v += [-J["figs"]["y%d" % i][0] for i in range(J["positions"]) if a < -J["figs"]["y%d" % i][0] < b]
        if k[0] == "y" and "behind" in J["figs"]:
            v += [-x for x in J["figs"]["behind"] if a < -x < b]
        ends.append(v)
    for cnr in itertools.product(*ends):
        f = dict(base)
        f.update(zip(keys, cnr))
        pts.append(f)
    for _ in range(n):
        f = dict(base)
        for k in keys:
            a, b = J["figs"][k]
            t = rng.random()
            f[k] = a if t < 0.2 else b if t > 0.8 else rng.uniform(a, b)
        pts.append(f)
    return pts, keys


def main(n, seed, kinds):
    rng = random.Random(seed)
    stat = collections.Counter()
    for t in range(n):
        kind = rng.choice(kinds)
        J = job(rng, kind)
        r, d = prog(J)
        path = "path" in J
        pts, keys = samples(J, 0 if not keys_banded(J) else (8 if path else 150), rng)
        if path and len(pts) > 14:
            pts = pts[:4] + pts[-4:]
        lo, hi, fail, ok = {}, {}, [], []
        for f in pts:
            try:
                E = exact(J, f)
            except Out as e:
                fail.append(str(e))
                continue
            except ValueError as e:
                fail.append("math " + str(e))
                continue
            ok.append((f, E))
            for k, v in E["q"].items():
                a, b = v if isinstance(v, tuple) else (v, v)
                lo[k] = min(lo.get(k, 1e99), a)
                hi[k] = max(hi.get(k, -1e99), b)
        held = {tuple(p.get("held", False) for p in E["places"]) for _, E in ok}
        if d is None:
            stat["refused" if fail else "REFUSED-BUT-MINE-OK"] += 1
            if not fail:
                print("== job", t, kind, "refused but fine here:", r.stderr[:400].replace("\n", " | "))
                save(J, t, seed)
            continue
        if fail:
            stat["mine-fails"] += 1
            print("== job", t, kind, "program takes it, peer says", collections.Counter(fail), "of", len(pts))
            save(J, t, seed)
            continue
        if len(held) > 1:
            stat["mixed held"] += 1
        stat["compared"] += 1
        est = {}
        for e in d["estimates"]:
            est[e["quantity"], e["evidence"]] = e
        bad = []
        for k in sorted(set(lo) | {k for k in est if k[0] in COMPARED}):
            if k not in est:
                bad.append("%s %s: none printed, here %.9g .. %.9g" % (k + (lo[k], hi[k])))
                continue
            if k not in lo and k[0] == "total_fall_distance" and est[k]["bound"] == "at least":
                continue                     # a floor beside a swing
            if k not in lo:
                bad.append("%s %s: printed %s .. %s, none here" % (k + (est[k]["low"], est[k]["high"])))
                continue
            e = est[k]
            tol = (2e-7 if k[1] == "modelled" else 1e-10)
            pl, ph = e["low"], e["high"]
            wide = 1 if path else 1
            if k[0] == "total_fall_distance" and e["bound"] == "at least":
                if pl > lo[k] * (1 + 1e-12):
                    bad.append("total fall: the floor %g is above %g" % (pl, lo[k]))
                continue
            if k[0] == "clearance_left":
                ceil = any(E.get(("ceiling", k[1])) for _, E in ok)
                want = "at most" if ceil else "between"
                if e["bound"] != want and not (e["bound"] == "at least" and want == "between"):
                    bad.append("clearance_left: bound %s, here %s" % (e["bound"], want))
                if ceil:
                    if ph is not None and abs(ph - hi[k]) > 1e-6:
                        bad.append("clearance_left %s: ceiling %.12g, here %.12g" % (k[1], ph, hi[k]))
                    continue
                if e["bound"] == "at least":
                    ph = hi[k]
            for mine, theirs, side in ((lo[k], pl, "low"), (hi[k], ph, "high")):
                if theirs is None:
                    if side == "high" and e["bound"] == "at least" and k[0] == "clearance_needed":
                        theirs = e["reach"]
                        if not any(E["missing", k[1]] for _, E in ok):
                            bad.append("clearance_needed: a floor, nothing is missing here")
                if theirs is None:
                    if side == "high" and e["bound"] == "at_least" or side == "low" and e["bound"] == "at_most":
                        continue
                    bad.append("%s %s %s: open (%s), here %.12g" % (k + (side, e["bound"], mine)))
                    continue
                df = theirs - mine
                sc = max(1e-3 if k[1] == "modelled" else 1e-6, abs(mine))
                inside = df > tol * sc if side == "low" else df < -tol * sc
                loose = abs(df) > (tol if not keys else 1e-6) * sc
                if k[1] == "shape" and side == "low" and theirs <= mine:
                    if keys:
                        continue
                if k[0] == "total_fall_distance" and e["bound"] == "at least":
                    continue
                if inside or loose:
                    bad.append("%s %s %s: printed %.12g, here %.12g (%s)%s" % (
                        k + (side, theirs, mine, "TOO NARROW" if inside else "wider", " held mixed" if len(held) > 1 else "")))
        stat["figures"] += 2 * len(set(lo) & set(est))
        if bad:
            stat["jobs with a difference"] += 1
            print("== job", t, kind, "banded:", keys)
            for b in bad:
                print("   ", b)
            save(J, t, seed)
    print(dict(stat))


COMPARED = {"free_fall", "offset_angle", "swing_angle", "swing_drop", "restraint_reach", "total_fall_distance", "clearance_needed",
            "swing_speed", "peak_force", "fall_speed", "clearance_left"}


def keys_banded(J):
    return any(a != b for a, b in J["figs"].values())


def save(J, t, seed):
    print("    " + os.path.join(FOLDER, "job.toml").replace("job", "%d-%d" % (seed, t)))
    with open(os.path.join(FOLDER, "%d-%d.toml" % (seed, t)), "w") as f:
        f.write("\n".join(J["text"]) + "\n")


if __name__ == "__main__":
    PROG = sys.argv[1]
    FOLDER = tempfile.mkdtemp(prefix="layouts-")
    jobs, seed, kinds = (sys.argv[2:] + ["300", "1", "plain,below,edge,retr"][len(sys.argv) - 2:])[:3]
    main(int(jobs), int(seed), kinds.split(","))
