#!/usr/bin/env bash
# Opens a report in a headless browser at three sizes, works its controls and looks for errors.
# browser.sh PROGRAM CHROMIUM
set -eu
program=$1 browser=$2
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
"$program" draft trough "$work/row.xml" --aperture 1.5m --length 6m > /dev/null
"$program" check "$work/row.xml" --out "$work/report" --quiet > /dev/null 2>&1 || [ $? -eq 1 ]

# The page with a probe at its end: it turns the pose, changes wind, colour and motion, clicks the frame, and notes
# what it finds in attributes of the root element.
cat "$work/report/report.html" - > "$work/probed.html" <<'PROBE'
<script>
window.addEventListener('load', () => setTimeout(() => {
  const note = document.documentElement.dataset, view = document.getElementById('view');
  const set = (name, value) => {
    const control = view.querySelector('[data-name=' + name + ']');
    control.value = value;
    control.dispatchEvent(new Event('input'));
  };
  const said = view.querySelector('.said');
  const before = said.textContent;
  set('pose', view.querySelector('[data-name=pose]').max);
  note.probeStates = said.textContent !== before ? 'change' : 'stuck';
  set('colour', 'stress');
  set('scale', view.querySelector('[data-name=scale]').options[0].value);
  const canvas = view.querySelector('canvas'), box = canvas.getBoundingClientRect();
  let hit = false;
  for (let i = 1; i < 20 && !hit; ++i) {
    const at = { bubbles: true, pointerId: 1, clientX: box.left + box.width * i / 20, clientY: box.top + box.height / 2 };
    canvas.setPointerCapture = () => {};
    canvas.dispatchEvent(new PointerEvent('pointerdown', at));
    canvas.dispatchEvent(new PointerEvent('pointerup', at));
    hit = /axial .* N.*stress at most/.test(said.textContent);
  }
  note.probePick = hit ? 'hit' : 'missed';
  note.probeFigures = document.querySelectorAll('figure svg').length;
  note.probeSpill = document.documentElement.scrollWidth > window.innerWidth + 1 ? 'spills' : 'fits';
  note.probeDone = 'yes';
}, 300));
</script>
PROBE

flags="--headless --no-sandbox --disable-gpu --use-gl=angle --use-angle=swiftshader --enable-unsafe-swiftshader --no-first-run"
for size in 390,844 1280,800 2000,1200; do
  "$browser" $flags --user-data-dir="$work/profile" --window-size=$size --enable-logging=stderr --v=0 \
    --virtual-time-budget=8000 --dump-dom "file://$work/probed.html" > "$work/dom.html" 2> "$work/log"
  if grep -E "CONSOLE.*(Uncaught|Error|error)" "$work/log"; then echo "errors at $size"; exit 1; fi
  for want in 'data-ready="yes"' 'data-probe-done="yes"' 'data-probe-states="change"' 'data-probe-pick="hit"' \
    'data-probe-spill="fits"'; do
    grep -q -- "$want" "$work/dom.html" || { echo "not found at $size: $want"; grep -o 'data-probe[^ >]*' "$work/dom.html" || true; exit 1; }
  done
  figures=$(grep -o 'data-probe-figures="[0-9]*"' "$work/dom.html" | tr -dc 0-9)
  [ "$figures" -ge 6 ] || { echo "only $figures figures at $size"; exit 1; }
done
"$browser" $flags --user-data-dir="$work/profile" --no-pdf-header-footer --print-to-pdf="$work/report.pdf" \
  "file://$work/report/report.html" > /dev/null 2>&1
[ "$(head -c 5 "$work/report.pdf")" = "%PDF-" ] || { echo "no PDF"; exit 1; }
