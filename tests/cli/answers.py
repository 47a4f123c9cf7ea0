#!/usr/bin/env python3
# SPDX-License-Identifier: MIT
"""The JSON answers, member by member and in order: answers.py CLI EXAMPLES PLANS.

The answers are a contract with scripts: members may be added, none taken away
or moved.  Every number must be a plain decimal (no exponent)."""
import json, os, re, subprocess, sys

cli, examples, plans = sys.argv[1:4]
failures = []


def ask(status, *args):
    done = subprocess.run([cli, *args], capture_output=True, text=True, timeout=120)
    if done.returncode != status:
        failures.append(f"{args}: status {done.returncode} instead of {status}: {done.stderr}")
    outside_strings = re.sub(r'"(?:[^"\\]|\\.)*"', '""', done.stdout)
    if re.search(r"\d[eE][+-]?\d", outside_strings):
        failures.append(f"{args}: a number with an exponent")
    pairs = json.loads(done.stdout, object_pairs_hook=lambda p: p if len({k for k, _ in p}) == len(p) else failures.append(f"{args}: a member twice") or p)
    return pairs


def order(what, pairs, names):
    """The names stand in the object, in this order (others may stand between)."""
    got = [k for k, _ in pairs if k in names]
    if got != names:
        failures.append(f"{what}: members {got} instead of {names}")
    return dict(pairs)


def is_object(x):
    return isinstance(x, list) and x and all(isinstance(p, tuple) for p in x)


CHECK = ["answer_version", "plan", "file", "size", "walls", "floor", "openings", "simply_connected", "hand_walk",
         "shortest_steps", "dead_ends", "junctions", "longest_straight", "findings", "sound"]


def check(name, status):
    answer = order(name, ask(status, "check", "--json", name), CHECK)
    size = order("size", answer["size"], ["columns", "rows", "cells", "width_mm", "depth_mm", "clear_width_mm"])
    walls = order("walls", answer["walls"], ["edges", "length_mm", "components", "islands", "island_edges", "lone_posts"])
    floor = order("floor", answer["floor"], ["regions", "pockets", "pocket_cells", "loops"])
    order("openings", answer["openings"], ["declared", "leaks"])
    hands = order("hand_walk", answer["hand_walk"], ["right", "left"])
    for hand in hands.values():
        order("hand", hand, ["arrives", "steps", "cells", "ends"])
    for finding in answer["findings"]:
        f = order("finding", finding, ["code", "severity", "at", "cells", "text", "remedies"])
        if f["severity"] not in ("breaks", "hinders", "notes") or len(f["at"]) != 2 or not f["text"]:
            failures.append(f"{name}: {f}")
    # What must hold between the numbers.
    if walls["components"] != walls["islands"] + 1 or len(walls["island_edges"]) != walls["islands"]:
        failures.append(f"{name}: {walls}")
    if answer["simply_connected"] != (floor["regions"] == 1 and walls["islands"] == 0 and walls["lone_posts"] == 0):
        failures.append(f"{name}: the verdict does not follow from {walls} and {floor}")
    if any(f[0][0] == "code" and dict(f)["severity"] == "breaks" for f in answer["findings"]) != (status == 1):
        failures.append(f"{name}: status {status} and severities differ")
    return answer, size


for name, status in (("first-maze", 0), ("classic-16", 0), ("wide-hall", 0), ("island", 1)):
    path = os.path.join(examples, name + ".mazeplan")
    answer, size = check(path, status)
    if answer["simply_connected"] != (name != "island"):
        failures.append(f"{name}: simply connected {answer['simply_connected']}")
    # 16 * 180 + 12 = 2 892: the classic maze over all (IEEE Region 1 / APEC contest rules; sum computed).
    if name == "classic-16" and (size["width_mm"], size["depth_mm"], size["clear_width_mm"]) != (2892, 2892, 168):
        failures.append(f"classic-16: {size}")
    for hand in ("right", "left"):
        run = ask(0 if name != "island" else 1, "follow", "--exact", "--json", "--hand", hand, path)
        run = order("follow", run, ["answer_version", "hand", "seed", "outcome", "time_s", "distance_m",
                                    "least_clearance_mm", "ticks", "cells", "events", "why"])
        order("event", run["events"][0], ["t", "state", "x", "y", "heading_deg", "cell"])
        walk = dict(dict(answer["hand_walk"])[hand])
        if name != "island" and (run["outcome"] != "arrived" or len(run["cells"]) != walk["steps"] + 1):
            failures.append(f"{name} {hand}: {run['outcome']}, {len(run['cells'])} cells driven, walk of {walk['steps']} steps")
    cuts = order("cutlist", ask(0, "cutlist", "--json", path),
                 ["answer_version", "joint", "panels", "posts", "total_length_mm", "saw_plan", "from_kit", "cannot_cut"])
    for panel in cuts["panels"]:
        p = order("panel", panel, ["length_mm", "height_mm", "thickness_mm", "count", "slots_mm", "labels", "places"])
        if not p["count"] == len(p["labels"]) == len(p["places"]):
            failures.append(f"{name}: {p}")
    saw = order("saw_plan", cuts["saw_plan"],
                ["pieces_of_stock", "cost", "proven", "bound", "used_mm", "offcuts_mm", "patterns"])
    total = sum(dict(p)["length_mm"] * dict(p)["count"] for p in cuts["panels"])
    cut = 0
    for pattern in saw["patterns"]:
        q = order("pattern", pattern, ["stock", "count", "cuts", "left_mm"])
        cut += q["count"] * sum(dict(c)["length_mm"] * dict(c)["count"] for c in q["cuts"])
    if not abs(total - cut) < 1e-6 or not abs(total - cuts["total_length_mm"]) < 1e-6 or saw["proven"] != (saw["cost"] == saw["bound"]):
        failures.append(f"{name}: {total} mm of panels, {cut} mm in the saw plan, {saw['cost']} {saw['bound']}")

# A bad file among good ones stops nothing; the status is the highest.
many = order("many", ask(3, "check", "--json", os.path.join(plans, "newer.mazeplan"), os.path.join(examples, "island.mazeplan")),
             ["answer_version", "plans"])
order("faults", many["plans"][0], ["file", "faults"])
order("plan", many["plans"][1], CHECK)

# kerf: p pieces fit when sum (length + kerf) <= stock + kerf; values computed, kerf 3.
for stock, length, fits in ((2440, 610, 3), (2440, 1220, 1), (2440, 487, 4), (1220, 150, 7), (2440, 168, 14)):
    text = json.dumps({"kind": "kerfhand saw order", "version": 1, "kerf_mm": 3, "end_trim_mm": 0,
                       "stock": [{"length_mm": stock, "price": 1}], "pieces": [{"length_mm": length, "count": fits * 3}]})
    done = subprocess.run([cli, "saw", "--json", "-"], input=text, capture_output=True, text=True)
    answer = json.loads(done.stdout)
    if list(answer)[0] != "answer_version" or answer["saw_plan" if "saw_plan" in answer else "pieces_of_stock"] is None:
        failures.append(f"saw: {list(answer)}")
    plan = answer.get("saw_plan", answer)
    if plan["pieces_of_stock"] != 3 or not plan["proven"]:
        failures.append(f"kerf {stock}/{length}: {plan}")

print("\n".join(failures) or "all answers as promised")
sys.exit(1 if failures else 0)
