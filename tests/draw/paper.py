#!/usr/bin/env python3
# SPDX-License-Identifier: MIT
"""True sizes on paper, measured: paper.py CLI EXAMPLES.

ISO 216: A4 210 x 297 = 595.276 x 841.890 pt. ISO 5455:1979: 1:20 is the largest scale of its series at which
a square of 2 892 mm fits on A4 with 10 mm margins. CSS Values 3: 1 in = 72 pt = 25.4 mm."""
import os, re, shutil, struct, subprocess, sys, tempfile

cli, examples = os.path.abspath(sys.argv[1]), sys.argv[2]
if not shutil.which("pdftoppm") or not shutil.which("pdfinfo"):
    print("poppler-utils is missing: left out")
    sys.exit(77)
work = tempfile.mkdtemp()
failures = []


def draw(name, ending, *options):
    path = os.path.join(work, name + ending)
    subprocess.run([cli, "draw", "--output", path, *options, os.path.join(examples, name + ".mazeplan")], check=True)
    return path


def grey(path):
    """The page at 254 dpi: ten pixels a millimetre."""
    subprocess.run(["pdftoppm", "-r", "254", "-gray", path, path[:-4]], check=True)
    data = open(path[:-4] + "-1.pgm", "rb").read()
    head = re.match(rb"P5\s+(\d+)\s+(\d+)\s+255\s", data)
    width, height = int(head.group(1)), int(head.group(2))
    body = data[head.end():]
    return width, height, [body[i * width:(i + 1) * width] for i in range(height)]


def longest_dark(row, first, last):
    best = run = 0
    for value in row[first:last]:
        run = run + 1 if value < 160 else 0
        best = max(best, run)
    return best


for name, over_all, scale in (("classic-16", 2892, 20), ("first-maze", 1092, 10), ("wide-hall", 2418, 20)):
    path = draw(name, ".pdf")
    info = subprocess.run(["pdfinfo", path], capture_output=True, text=True, check=True).stdout
    size = sorted(float(v) for v in re.search(r"Page size:\s+([\d.]+) x ([\d.]+)", info).groups())
    if abs(size[0] - 595.276) > 0.01 or abs(size[1] - 841.890) > 0.01 or "Pages:           1" not in info:
        failures.append(f"{name}: {info}")
    text = subprocess.run(["pdftotext", path, "-"], capture_output=True, text=True, check=True).stdout
    if f"1 : {scale} on A4" not in text or "100 mm: measure this bar" not in text or "Local rules" not in text:
        failures.append(f"{name}: the words of the page: {text}")
    width, height, rows = grey(path)
    # The check bar: the longest line in the strip above the title block, inside the frame.
    bar = max(longest_dark(rows[y], 130, width - 130) for y in range(height - 530, height - 430))
    if abs(bar - 1000) > 4:
        failures.append(f"{name}: the check bar is {bar / 10} mm on paper")
    # The south or north boundary, whichever is whole: over all, at the scale. First maze and hall are closed there.
    wall = max(longest_dark(rows[y], 150, width - 150) for y in range(300, height - 560))
    if abs(wall - 10 * over_all / scale) > 4:
        failures.append(f"{name}: {wall / 10} mm on paper instead of {over_all / scale}")
    # Nothing beyond the frame's margin but the line of caution below it.
    for y in list(range(0, 90)) + list(range(height - 40, height)):
        if min(rows[y]) < 200:
            failures.append(f"{name}: ink in the margin, row {y}")
            break
    if any(min(row[:90]) < 200 or min(row[-90:]) < 200 for row in rows):
        failures.append(f"{name}: ink in a side margin")

svg = open(draw("first-maze", ".svg"), encoding="utf-8").read()
mm = re.search(r'<svg[^>]* width="([\d.]+)mm" height="([\d.]+)mm"', svg)
if not mm or float(mm.group(1)) < 1092 or float(mm.group(2)) < 732 or abs(float(mm.group(1)) - float(mm.group(2)) - (1092 - 732)) > 1e-6:
    failures.append(f"SVG: {svg[:300]}")
png = open(draw("classic-16", ".png", "--pixels", "900"), "rb").read()
if png[:8] != b"\x89PNG\r\n\x1a\n" or max(struct.unpack(">II", png[16:24])) not in range(899, 902):
    failures.append(f"PNG: {struct.unpack('>II', png[16:24])}")
shutil.rmtree(work)
print("\n".join(failures) or "sizes are true")
sys.exit(1 if failures else 0)
