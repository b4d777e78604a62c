// The frame to be turned, zoomed and asked. Needs THREE; reads the JSON of #view-data.
// Lengths in the data: millimetres; motions: micrometres. Everything that turns is in collector axes.
(function () {
  'use strict';
  const place = document.getElementById('view');
  const data = JSON.parse(document.getElementById('view-data').textContent);
  const canvas = place.querySelector('canvas');
  const said = place.querySelector('.said');
  let renderer;
  try {
    renderer = new THREE.WebGLRenderer({ canvas: canvas, antialias: true, alpha: true });
  } catch (no_webgl) {
    place.querySelector('.bar').remove();
    canvas.remove();
    said.textContent = 'This browser cannot show the turning view. The drawings below show the same frame.';
    return;
  }
  renderer.setPixelRatio(Math.min(2, window.devicePixelRatio || 1));

  const css = name => getComputedStyle(document.documentElement).getPropertyValue(name).trim();
  const groupColours = ['--one', '--two', '--three', '--soft', '--good', '--ink'];
  const scene = new THREE.Scene();
  scene.add(new THREE.HemisphereLight(0xffffff, 0x8a8f94, 0.95));
  const sun = new THREE.DirectionalLight(0xffffff, 0.5);
  sun.position.set(0.3, 0.6, 1);
  scene.add(sun);
  const camera = new THREE.PerspectiveCamera(32, 1, 0.05, 2000);
  camera.up.set(0, 0, 1);

  const bars = data.bars.length, points = data.points.length / 3;
  const shape = new THREE.CylinderBufferGeometry(0.5, 0.5, 1, 10, 1);
  const members = new THREE.InstancedMesh(shape, new THREE.MeshLambertMaterial({ color: 0xffffff }), bars);
  members.frustumCulled = false;
  const colours = new Float32Array(3 * bars);
  // Colour per instance: this release of the library has no setColorAt, so the attribute is fed by hand.
  shape.setAttribute('tint', new THREE.InstancedBufferAttribute(colours, 3));
  members.material.onBeforeCompile = shader => {
    shader.vertexShader = 'attribute vec3 tint;\nvarying vec3 vTint;\n' +
      shader.vertexShader.replace('#include <begin_vertex>', '#include <begin_vertex>\nvTint = tint;');
    shader.fragmentShader = 'varying vec3 vTint;\n' +
      shader.fragmentShader.replace('vec4 diffuseColor = vec4( diffuse, opacity );',
        'vec4 diffuseColor = vec4( vTint, opacity );');
  };
  scene.add(members);

  const still = new THREE.LineSegments(new THREE.BufferGeometry(), new THREE.LineBasicMaterial());
  still.geometry.setAttribute('position', new THREE.BufferAttribute(new Float32Array(6 * bars), 3));
  still.frustumCulled = false;
  scene.add(still);

  const skin = new THREE.Mesh(new THREE.BufferGeometry(),
    new THREE.MeshLambertMaterial({ side: THREE.DoubleSide, transparent: true, opacity: 0.35, depthWrite: false }));
  skin.geometry.setAttribute('position', new THREE.BufferAttribute(new Float32Array(data.mirror.length), 3));
  const faces = [];
  for (let s = 0; s + 1 < data.stations; ++s) {
    if (data.module[s] !== data.module[s + 1]) continue;
    for (let r = 0; r + 1 < data.rows; ++r) {
      const a = s * data.rows + r, b = a + data.rows;
      faces.push(a, b, a + 1, b, b + 1, a + 1);
    }
  }
  skin.geometry.setIndex(faces);
  skin.frustumCulled = false;
  scene.add(skin);
  const ground = new THREE.Mesh(new THREE.PlaneBufferGeometry(1, 1),
    new THREE.MeshBasicMaterial({ transparent: true, opacity: 0.12, side: THREE.DoubleSide, depthWrite: false }));
  scene.add(ground);

  // Collector axes of an elevation in world axes: y = (0, sin e, -cos e), z = (0, cos e, sin e).
  function toWorld(out, k, list, move, scale, turns, e) {
    let x = list[3 * k] / 1e3, y = list[3 * k + 1] / 1e3, z = list[3 * k + 2] / 1e3;
    if (turns) z += data.axisToVertex;
    if (move) {
      x += scale * move[3 * k] / 1e6;
      y += scale * move[3 * k + 1] / 1e6;
      z += scale * move[3 * k + 2] / 1e6;
    }
    if (!turns) return out.set(x, y, z);
    const s = Math.sin(e), c = Math.cos(e);
    return out.set(x, s * y + c * z, -c * y + s * z + data.axisHeight);
  }

  const input = name => place.querySelector('[data-name=' + name + ']');
  const poses = [...new Set(data.states.map(s => s.pose))];
  input('pose').max = poses.length - 1;
  const start = data.states[data.first || 0];
  input('pose').value = poses.indexOf(start.pose);

  const from = new THREE.Vector3(), to = new THREE.Vector3(), along = new THREE.Vector3();
  const upright = new THREE.Vector3(0, 1, 0), q = new THREE.Quaternion(), m = new THREE.Matrix4();
  const middle = new THREE.Vector3(), size = new THREE.Vector3();
  let state = start, chosen = -1;
  const ends = new Float32Array(6 * bars);

  function fillWinds() {
    const here = data.states.filter(s => s.pose === poses[+input('pose').value]);
    const select = input('wind'), before = select.value;
    select.innerHTML = '';
    here.forEach(s => select.add(new Option(s.wind, s.wind)));
    if (here.some(s => s.wind === before)) select.value = before;
    else if (here.includes(start)) select.value = start.wind;
  }

  function tint() {
    const byStress = input('colour').value === 'stress';
    for (let i = 0; i < bars; ++i) {
      const [, , , group, , allowed] = data.bars[i];
      const c = new THREE.Color();
      if (i === chosen) c.set(css('--bad'));
      else if (!byStress) c.set(css(groupColours[group % groupColours.length]));
      else {
        const used = allowed > 0 ? Math.min(1, state.forces[5 * i + 4] / allowed) : 0;
        c.set(css('--rule')).lerp(new THREE.Color(css('--two')), Math.sqrt(used));
      }
      colours.set([c.r, c.g, c.b], 3 * i);
    }
    shape.attributes.tint.needsUpdate = true;
  }

  function place_parts() {
    const pose = poses[+input('pose').value];
    state = data.states.find(s => s.pose === pose && s.wind === input('wind').value) ||
      data.states.find(s => s.pose === pose);
    const scale = +input('scale').value, e = state.elevation;
    place.querySelector('[data-of=pose]').textContent = state.kind + ' ' + (e * 180 / Math.PI).toFixed(0) + '\u00b0';
    const rest = still.geometry.attributes.position.array;
    for (let i = 0; i < bars; ++i) {
      const [a, b, thick] = data.bars[i];
      const ta = data.turns[a], tb = data.turns[b];
      toWorld(from, a, data.points, null, 0, ta, e).toArray(rest, 6 * i);
      toWorld(to, b, data.points, null, 0, tb, e).toArray(rest, 6 * i + 3);
      toWorld(from, a, data.points, state.moves, scale, ta, e).toArray(ends, 6 * i);
      toWorld(to, b, data.points, state.moves, scale, tb, e).toArray(ends, 6 * i + 3);
      along.subVectors(to, from);
      const length = along.length() || 1e-6;
      q.setFromUnitVectors(upright, along.multiplyScalar(1 / length));
      m.compose(middle.addVectors(from, to).multiplyScalar(0.5), q, size.set(thick / 1e3, length, thick / 1e3));
      members.setMatrixAt(i, m);
    }
    members.instanceMatrix.needsUpdate = true;
    still.geometry.attributes.position.needsUpdate = true;
    const face = skin.geometry.attributes.position.array;
    for (let k = 0; k < data.mirror.length / 3; ++k)
      toWorld(from, k, data.mirror, state.mirror, scale, true, e).toArray(face, 3 * k);
    skin.geometry.attributes.position.needsUpdate = true;
    skin.geometry.computeVertexNormals();
    skin.visible = input('mirror').checked;
    still.visible = scale > 0 && input('still').checked;
    tint();
    say();
    render();
  }

  function say() {
    const words = ['<b>' + state.words + '</b>'];
    if (chosen < 0) words.push('Click a member to read its forces. Drag turns, wheel or pinch zooms, two fingers or the right button move.');
    else {
      const b = data.bars[chosen], f = state.forces.slice(5 * chosen, 5 * chosen + 5);
      const n = v => (Math.abs(v) < 10 ? v.toFixed(1) : v.toFixed(0));
      words.push('<b>' + data.names[b[4]] + '</b> (' + data.groups[b[3]] + '): axial ' + n(f[0]) + ' N' +
        (Math.abs(f[0]) < 0.05 ? '' : f[0] > 0 ? ' tension' : ' compression') + ', shear ' + n(f[1]) + ' N, torsion ' +
        n(f[2]) + ' N m, bending ' + n(f[3]) + ' N m, stress at most ' + n(f[4]) + ' MPa' +
        (b[5] > 0 ? ' of ' + b[5] + ' MPa yield' : ', yield not known') + '. Unfactored.');
    }
    said.innerHTML = words.join('<br>');
  }

  // Where the eye is: on a sphere around the target.
  const target = new THREE.Vector3(data.length / 2, 0, data.axisHeight * 0.8);
  let turn = -0.9, lift = 0.42, far = 1;
  function fit() {
    far = 0.3 * data.length / (0.287 * camera.aspect) + 0.2 * data.length + 1.2 * (data.axisHeight + data.width);
  }
  function render() {
    camera.position.set(target.x + far * Math.cos(lift) * Math.sin(turn) , target.y - far * Math.cos(lift) * Math.cos(turn),
      target.z + far * Math.sin(lift));
    camera.near = far / 200;
    camera.far = far * 20;
    camera.lookAt(target);
    camera.updateProjectionMatrix();
    still.material.color.set(css('--soft'));
    skin.material.color.set(css('--one'));
    ground.material.color.set(css('--soft'));
    renderer.render(scene, camera);
  }
  function resize() {
    const width = place.clientWidth, height = Math.max(260, Math.min(520, width * 0.56));
    renderer.setSize(width, height, false);
    canvas.style.height = height + 'px';
    camera.aspect = width / height;
    render();
  }

  function nearest(x, y) {
    const a = new THREE.Vector3(), b = new THREE.Vector3();
    let best = 14, which = -1;
    const w = canvas.clientWidth, h = canvas.clientHeight;
    for (let i = 0; i < bars; ++i) {
      a.fromArray(ends, 6 * i).project(camera);
      b.fromArray(ends, 6 * i + 3).project(camera);
      const ax = (a.x + 1) / 2 * w, ay = (1 - a.y) / 2 * h, bx = (b.x + 1) / 2 * w, by = (1 - b.y) / 2 * h;
      const dx = bx - ax, dy = by - ay, l = dx * dx + dy * dy || 1e-9;
      const t = Math.max(0, Math.min(1, ((x - ax) * dx + (y - ay) * dy) / l));
      const d = Math.hypot(x - ax - t * dx, y - ay - t * dy);
      if (d < best) { best = d; which = i; }
    }
    return which;
  }

  const down = new Map();
  let moved = 0, spread = 0;
  canvas.addEventListener('pointerdown', e => {
    canvas.setPointerCapture(e.pointerId);
    down.set(e.pointerId, e);
    moved = 0;
    spread = 0;
  });
  canvas.addEventListener('pointermove', e => {
    const last = down.get(e.pointerId);
    if (!last) return;
    const dx = e.clientX - last.clientX, dy = e.clientY - last.clientY;
    moved += Math.abs(dx) + Math.abs(dy);
    down.set(e.pointerId, e);
    const step = far / canvas.clientHeight * 0.6;
    if (down.size > 1) {
      const [p, r] = [...down.values()];
      const wide = Math.hypot(p.clientX - r.clientX, p.clientY - r.clientY);
      if (spread) far *= spread / wide;
      spread = wide;
    }
    if (down.size > 1 || e.buttons & 2 || e.shiftKey) {
      target.x -= step * dx * Math.cos(turn);
      target.y -= step * dx * Math.sin(turn);
      target.z += step * dy;
    } else {
      turn -= dx * 0.008;
      lift = Math.max(-0.3, Math.min(1.55, lift + dy * 0.006));
    }
    render();
  });
  canvas.addEventListener('pointerup', e => {
    down.delete(e.pointerId);
    if (moved > 5) return;
    const r = canvas.getBoundingClientRect();
    chosen = nearest(e.clientX - r.left, e.clientY - r.top);
    tint();
    say();
    render();
  });
  canvas.addEventListener('pointercancel', e => down.delete(e.pointerId));
  canvas.addEventListener('contextmenu', e => e.preventDefault());
  canvas.addEventListener('wheel', e => {
    e.preventDefault();
    far *= Math.exp(e.deltaY * 0.0012);
    render();
  }, { passive: false });

  input('pose').addEventListener('input', () => { fillWinds(); place_parts(); });
  ['wind', 'scale', 'colour', 'mirror', 'still'].forEach(n => input(n).addEventListener('input', place_parts));
  window.addEventListener('resize', resize);
  window.matchMedia('(prefers-color-scheme:dark)').addEventListener('change', place_parts);

  ground.scale.set(data.length * 1.3, data.width * 3, 1);
  ground.position.set(data.length / 2, 0, -0.01);
  [0, 0.2, 0.5, 1, 2, 5].forEach(k => {
    const v = k * data.scale;
    input('scale').add(new Option('\u00d7 ' + (v < 10 ? +v.toFixed(1) : Math.round(v)), v, k === 1, k === 1));
  });
  fillWinds();
  resize();
  fit();
  place_parts();
  place.dataset.ready = 'yes';
})();
