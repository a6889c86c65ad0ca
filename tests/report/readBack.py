"""Reads the tables of the terminal back with astropy. usage: readBack.py lines.ecsv lines.vot lines.mrt"""
import sys

from astropy.table import Table

FORMATS = {"ecsv": "ascii.ecsv", "vot": "votable", "mrt": "ascii.mrt"}
for path in sys.argv[1:]:
    table = Table.read(path, format=FORMATS[path.rsplit(".", 1)[1]])
    print(path, len(table), "rows", len(table.colnames), "columns")
