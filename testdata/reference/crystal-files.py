#!/usr/bin/python3
"""Makes crystal-files.csv: what gemmi makes of each CIF of Debian's libavogadro-data.

Needs Debian's python3-gemmi and libavogadro-data. Run: crystal-files.py > crystal-files.csv
Columns: file, SHA-256, cell volume in cubic angstroms, number of symmetry operations (those the file lists, else those
of its symbol), number of distinct atom positions in the cell (images nearer than 0.0015 of each edge are one), or, in
the column refused, why gemmi cannot read the file.
"""
import csv
import hashlib
import os
import sys

import gemmi

ROOT = '/usr/share/avogadro2/crystals'
SAME = 0.0015
TAGS = ('_symmetry_equiv_pos_as_xyz', '_space_group_symop_operation_xyz', '_space_group_symop.operation_xyz')


def positions(sites, group):
    found = []
    for site in sites:
        for op in group:
            image = [x % 1 for x in op.apply_to_xyz(site.fract.tolist())]
            if not any(all(abs(d - round(d)) <= SAME for d in (a - b for a, b in zip(image, other)))
                       for other in found):
                found.append(image)
    return len(found)


def row(path):
    try:
        block = next(b for b in gemmi.cif.read(path) if b.find_value('_cell_length_a'))
        structure = gemmi.make_small_structure_from_block(block)
        listed = [gemmi.cif.as_string(v) for tag in TAGS for v in block.find_values(tag)]
        if listed:
            group = gemmi.GroupOps([gemmi.Op(v) for v in listed])
        else:
            cell = structure.cell
            name = structure.spacegroup_hm.split('{')[0].strip()
            known = gemmi.find_spacegroup_by_name(name, cell.alpha, cell.gamma)
            group = known.operations() if known else gemmi.GroupOps([gemmi.Op('x,y,z')])
            if not known:
                print('no group for', path, name, file=sys.stderr)
        return ['%.6f' % structure.cell.volume, len(group), positions(structure.sites, group), '']
    except (ValueError, RuntimeError) as error:
        return ['', '', '', str(error).replace(path, '').lstrip(':').splitlines()[0]]


print('# What gemmi %s makes of the CIFs of libavogadro-data; see crystal-files.py.' % gemmi.__version__)
out = csv.writer(sys.stdout, lineterminator='\n')
out.writerow(['file', 'sha256', 'volume', 'operations', 'positions', 'refused'])
for folder, _, names in sorted(os.walk(ROOT)):
    for name in sorted(names):
        if name.endswith('.cif'):
            path = os.path.join(folder, name)
            with open(path, 'rb') as data:
                digest = hashlib.sha256(data.read()).hexdigest()
            out.writerow([os.path.relpath(path, ROOT), digest] + row(path))
