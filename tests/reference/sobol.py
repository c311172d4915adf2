"""Makes sobol.json: the unscrambled Sobol points, times 4096, that sobol.ts must reproduce (needs scipy)."""

import json
from pathlib import Path

import scipy
from scipy.stats import qmc

INDICES = [*range(16), 100, 1000, 2047, 2048, 3333, 4095]

points = (qmc.Sobol(24, scramble=False).random(4096) * 4096).round().astype(int)
source = (
    f"scipy {scipy.__version__}, scipy.stats.qmc.Sobol(24, scramble=False).random(4096) * 4096 "
    "(Joe-Kuo directions, new-joe-kuo-6); made by tests/reference/sobol.py"
)
rows = ",\n\t\t".join(json.dumps(points[index].tolist()) for index in INDICES)
text = (
    f'{{\n\t"source": {json.dumps(source)},\n\t"indices": {json.dumps(INDICES)},\n'
    f'\t"points": [\n\t\t{rows}\n\t]\n}}\n'
)
Path(__file__).with_name("sobol.json").write_text(text, encoding="utf-8")
