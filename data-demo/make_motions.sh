#!/usr/bin/env bash
# Makes the seven motions of the demo anew. Usage: bash data-demo/make_motions.sh path/to/pilotis
set -euo pipefail
pilotis=${1:?path of the program pilotis}
cd "$(dirname "$0")"
mkdir -p motions

# name, seed, peak, ground period, ground damping, end of strong part
make() {
  "$pilotis" synth kanai_tajimi --seed "$2" --step "0.01 s" --duration "20 s" --pga "$3" --ground-period "$4" \
    --ground-damping "$5" --strong-end "$6" -o "motions/$1.csv"
}
make quay-01      11 "0.42 g" "0.45 s" 0.55 "9 s"
make quay-02      12 "0.38 g" "0.50 s" 0.60 "10 s"
make ridge-03     13 "0.47 g" "0.30 s" 0.60 "7 s"
make ridge-04     14 "0.44 g" "0.35 s" 0.65 "8 s"
make lagoon-05    15 "0.33 g" "0.70 s" 0.50 "11 s"
make lagoon-06    16 "0.36 g" "0.65 s" 0.45 "12 s"
make old-mole-07  17 "0.40 g" "0.55 s" 0.60 "6 s"
