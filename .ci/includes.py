#!/usr/bin/env python3
# SPDX-License-Identifier: MIT
"""The include directions of DEVELOPERS.md, read from the sources: includes.py SOURCE-ROOT.

The linker enforces them too (one static library a folder), but a header below
the system's include root slips through there."""
import os, re, sys

LAYERS = {  # part: parts it may include
    "base": set(),
    "plan": {"base"},
    "layout": {"base", "plan"},
    "robot": {"base", "plan"},
    "panels": {"base", "plan"},
    "review": {"base", "plan", "layout", "robot", "panels"},
    "files": {"base", "plan", "layout", "robot", "panels", "review"},
    "draw": {"base", "plan", "layout", "robot", "panels", "review"},
    "cli": {"base", "plan", "layout", "robot", "panels", "review", "files", "draw"},
    "app": {"base", "plan", "layout", "robot", "panels", "review", "files", "draw"},
}
SYSTEM = {"cJSON": ({"files"}, r"cjson/|cJSON"), "GTK": ({"app"}, r"gtk/|gdk/|gsk/|adwaita"),
          "cairo": ({"draw", "app"}, r"cairo"), "Pango": ({"draw", "app"}, r"pango/"),
          "GIO": ({"files", "app"}, r"gio/")}
BANNED = re.compile(r"\b(strcpy|strcat|sprintf|vsprintf|gets|strtok|atoi|atof|system|alloca)\s*\(")
# The C library's own differ in the last bits from machine to machine.
EXACT = re.compile(r"(?<![\w.>])(sin|cos|tan|atan|atan2|asin|acos|exp|exp2|log|log2|log10|pow|hypot|fmod|remainder|cbrt|sincos)\s*\(")
EXACT_PARTS = {"base", "robot", "panels", "layout"}
MOST_LINES = {".c": 800, ".h": 300}

root = sys.argv[1]
faults = []
for folder, _, names in sorted(os.walk(os.path.join(root, "src"))):
    part = os.path.relpath(folder, os.path.join(root, "src")).split(os.sep)[0]
    for name in sorted(names):
        path = os.path.join(folder, name)
        ending = os.path.splitext(name)[1]
        if ending not in (".c", ".h") or part not in LAYERS:
            continue
        lines = open(path, encoding="utf-8").read().split("\n")
        where = os.path.relpath(path, root)
        if "SPDX-License-Identifier: MIT" not in lines[0]:
            faults.append(f"{where}:1: no SPDX line")
        if len(lines) > MOST_LINES[ending]:
            faults.append(f"{where}: {len(lines)} lines; has it more than one job?")
        for number, line in enumerate(lines, 1):
            code = re.sub(r'"(\\.|[^"\\])*"', '""', re.sub(r"//.*|/\*.*?\*/", "", line)) if "#include" not in line else line
            include = re.match(r'\s*#\s*include\s*[<"]([^>"]+)[>"]', line)
            if include:
                target = include.group(1)
                other = target.split("/")[0]
                if other in LAYERS and "/" in target and other != part and other not in LAYERS[part]:
                    faults.append(f"{where}:{number}: {part} may not include {target}")
                for what, (allowed, pattern) in SYSTEM.items():
                    if re.match(pattern, target) and part not in allowed:
                        faults.append(f"{where}:{number}: {part} may not include {what}")
                if part == "files" and ending == ".h" and re.search("json/|cJSON", target):
                    faults.append(f"{where}:{number}: no header of files shows a type of the JSON library")
            elif not line.lstrip().startswith(("*", "/*")):
                if BANNED.search(code):
                    faults.append(f"{where}:{number}: {BANNED.search(code).group(1)} is not used here")
                if part in EXACT_PARTS and EXACT.search(code):
                    faults.append(f"{where}:{number}: {EXACT.search(code).group(1)}: take it from base/elementary")
print("\n".join(faults) or "includes, calls and sizes as DEVELOPERS.md says")
sys.exit(1 if faults else 0)
