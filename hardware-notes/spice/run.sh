#!/usr/bin/env bash
# Runs every netlist here through ngspice and prints what came out, one "name value" a line: the content of results.txt.
#   ./run.sh > results.txt
set -euo pipefail
cd "$(dirname "$0")"
command -v ngspice > /dev/null || { echo "ngspice is not installed (Debian package ngspice)" >&2; exit 1; }
export LC_ALL=C
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT

# Netlist -> its RESULT and RAW lines; what else ngspice says goes into a log that is shown if nothing came out.
simulate() {
  ngspice -b "$1" > "$work/log" 2>&1 || true
  grep -hE '^(RESULT|RAW) ' "$work/log" || { cat "$work/log" >&2; exit 1; }
}

# "RESULT name value" -> "name value" with five significant digits.
tidy() {
  awk '$1 == "RESULT" {
    sub(/at_phase_0$/, "in_phase", $2); sub(/at_phase_3.14159265$/, "against", $2)
    v = $3 + 0; if (v < 1e-6 && v > -1e-6) v = 0
    printf "%s %.5g\n", $2, v }'
}

# Adds the amplitude at which the law's slope on log-log paper has fallen half way from 2 to 1.
with_knee() {
  awk -v name="$1" '
    { print }
    $1 ~ /law_mv\.at_volt_/ {
      a = $1; sub(/.*at_volt_/, "", a); a += 0
      if (a > 0 && $2 > 0) { n++; x[n] = log(a); y[n] = log($2) } }
    END {
      for (i = 1; i < n; i++) { m[i] = (x[i] + x[i + 1]) / 2; s[i] = (y[i + 1] - y[i]) / (x[i + 1] - x[i]) }
      # From the strong end down: a biased diode may start steeper than 2.
      for (i = n - 1; i > 1; i--) if (s[i] <= 1.5 && s[i - 1] > 1.5) {
        knee = exp(m[i] + (1.5 - s[i]) / (s[i - 1] - s[i]) * (m[i - 1] - m[i])); printf "%s.knee_volt %.5g\n", name, knee; exit } }'
}

simulate diode-pair.cir | tidy | with_knee diode_pair
simulate peak-detector.cir | tidy | with_knee peak

for arrangement in bare-after bare-before screened; do
  for k in 0.005 0; do
    awk -v arrangement=$arrangement -v k=$k -f drive.awk > "$work/drive.cir"
    simulate "$work/drive.cir" > "$work/out"
    tidy < "$work/out"
    awk '$1 == "RAW" { print $2, $3 }' "$work/out" >> "$work/raw-$arrangement"
  done
  awk -v name="drive.$arrangement" '
    $1 == "peak_mv" { peak = $2 } $1 == "feed_mv" { feed = $2 }
    END { printf "%s.antenna_mv_per_volt %.5g\n%s.feed_through_percent %.4g\n", name, peak, name, 100 * feed / peak }
  ' "$work/raw-$arrangement"
done

# The checksum of the alive line that enable.awk sends.
crc=7FAF
for run in typical/single typical/sparse weak/single weak/sparse slow/full; do
  awk -v corner="${run%/*}" -v traffic="${run#*/}" -v crc=$crc -f enable.awk > "$work/enable.cir"
  simulate "$work/enable.cir" | tidy
done
