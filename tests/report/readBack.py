"""Reads the tables of the terminal back with astropy. usage: readBack.py [--values] lines.ecsv lines.vot lines.mrt lines.fits

With --values prints one JSON object a file: rows, columns, and the first row's cells.
"""
import json
import sys

from astropy.table import Table

FORMATS = {"ecsv": "ascii.ecsv", "vot": "votable", "mrt": "ascii.mrt", "fits": "fits"}


def cell(value):
    text = value.decode() if isinstance(value, bytes) else value
    if hasattr(text, "mask") and getattr(text, "mask", False) is not False and bool(text.mask):
        return None
    if hasattr(text, "item"):
        text = text.item()
    return None if isinstance(text, float) and text != text else text.strip() if isinstance(text, str) else text


for path in [a for a in sys.argv[1:] if not a.startswith("--")]:
    table = Table.read(path, format=FORMATS[path.rsplit(".", 1)[1]])
    if "--values" in sys.argv:
        units = {name: str(table[name].unit) for name in table.colnames if table[name].unit is not None}
        print(json.dumps({"rows": len(table), "columns": table.colnames, "first": {n: cell(table[n][0]) for n in table.colnames}, "units": units}))
    else:
        print(path, len(table), "rows", len(table.colnames), "columns")
