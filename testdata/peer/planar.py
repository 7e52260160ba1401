"""A planar arrest on an elastic rope by scipy, and the elliptic integral of its swing: time and figures.

    /usr/bin/python3 testdata/peer/planar.py [ROUNDS]

100 kg on 2 m of rope of 9 kN/m, the anchor at the height of the D-ring and 1.2 m to the side, from the first pull to
where the body, sent back from the other side, goes down no more: the task of BenchmarkPlanar in arrest/rig. It prints
the process time of a run, the median of the rounds, imports and set-up left out, for every method at a tolerance of
1e-8; the figures of the tightest run, which the tests cite; and the time of one elliptic integral out of an array.
"""
import sys
import time

import numpy as np
from scipy.integrate import solve_ivp
from scipy.special import ellipk

G, MASS, STIFFNESS = 9.80665, 100.0, 22500 / 2.5
LENGTH, OFFSET, ANCHOR, DRING = 2.0, 1.2, 1.5, 1.5


def taut(_, y):
    u, w, vu, vw = y
    r = (u * u + w * w) ** 0.5
    pull = STIFFNESS * (r - LENGTH) / (MASS * r)
    return [vu, vw, -pull * u, G - pull * w]


def free(_, y):
    return [y[2], y[3], 0.0, G]


def event(f, direction, terminal):
    def g(t, y):
        return f(y)
    g.direction, g.terminal = direction, terminal
    return g


def length(y):
    return y[0] * y[0] + y[1] * y[1] - LENGTH * LENGTH


def rate(y):
    return y[0] * y[2] + y[1] * y[3]


SLACK, CATCH = event(length, -1, True), event(length, 1, True)
TURN, SINK, BACK = event(rate, -1, False), event(lambda y: y[3], -1, False), event(lambda y: y[2], 1, True)


def run(method, tolerance):
    depth = (LENGTH ** 2 - OFFSET ** 2) ** 0.5
    speed = (2 * G * (DRING - ANCHOR + depth)) ** 0.5
    t, y = speed / G, np.array([OFFSET, depth, 0.0, speed])
    peak, low, back = 0.0, (0.0, 0.0, 0.0), None
    while True:
        # Sent back, the body goes on to where the rope turns and it goes down no more.
        last = event(lambda y: max(rate(y), y[3]), -1, True) if back else BACK
        s = solve_ivp(taut, (t, t + 20), y, method=method, rtol=tolerance, atol=tolerance,
                      events=(SLACK, TURN, SINK, last))
        for at in s.y_events[1]:
            peak = max(peak, STIFFNESS * (np.hypot(at[0], at[1]) - LENGTH))
        for when, at in zip(s.t_events[2], s.y_events[2]):
            if at[1] > low[0]:
                low = (at[1], np.hypot(at[2], at[3]), when)
        t, y = s.t[-1], s.y[:, -1]
        if len(s.t_events[3]):
            back = back or t
            if rate(y) <= 1e-9 and y[3] <= 1e-9:
                return peak, low, back
            continue
        s = solve_ivp(free, (t, t + 20), y, method=method, rtol=tolerance, atol=tolerance, events=CATCH)
        t, y = s.t[-1], s.y[:, -1]


def main():
    rounds = int(sys.argv[1]) if len(sys.argv) > 1 else 9
    best = float("inf")
    for method in ("RK45", "DOP853", "LSODA", "Radau", "BDF", "RK23"):
        used = []
        for _ in range(rounds if method in ("RK45", "DOP853", "LSODA") else 2):
            before = time.process_time()
            peak, low, back = run(method, 1e-8)
            used.append(time.process_time() - before)
        used = sorted(used)[len(used) // 2]
        best = min(best, used)
        print("%-7s %9.3f ms   peak %.4f N   sent back at %.8f s" % (method, 1000 * used, peak, back))
    print("the best %9.3f ms" % (1000 * best))
    peak, low, back = run("DOP853", 1e-13)
    print("DOP853 at 1e-13: peak %.6f N, lowest %.9f m below the anchor at %.9f m/s and %.9f s, sent back at %.9f s"
          % (peak, low[0], low[1], low[2], back))
    m = np.sin(np.linspace(0.01, 1.5, 1000000) / 2) ** 2
    used = []
    for _ in range(rounds):
        before = time.process_time()
        ellipk(m)
        used.append(time.process_time() - before)
    print("ellipk, one of a million: %.1f ns" % (1000 * sorted(used)[len(used) // 2]))


main()
