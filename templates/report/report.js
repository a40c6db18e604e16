// The moment that is pointed at: every plot of a run and its map show the same one. Without this script the page reads as it stands.
(() => {
  'use strict';

  const readData = (element, name) => JSON.parse(element.querySelector(`script.${name}`).textContent);

  /** Index of the entry of a rising list that is nearest to a value. */
  function nearest(list, value) {
    let [low, high] = [0, list.length - 1];
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (list[middle] > value) high = middle;
      else low = middle;
    }
    return value - list[low] <= list[high] - value ? low : high;
  }

  function moveUprights(plots, place) {
    for (const plot of plots) {
      for (const svg of plot.querySelectorAll('svg')) {
        const { left, per } = svg.querySelector('.axis').dataset;
        const upright = svg.querySelector('.upright');
        upright.setAttribute('transform', `translate(${Number(left) + place * Number(per)} 0)`);
        upright.setAttribute('visibility', 'visible');
      }
    }
  }

  /** Makes plots answer to the pointer and the keyboard; places are along their axis, show(i) says the words of entry i. */
  function followPlots(plots, places, show) {
    let chosen = 0;
    const choose = (index) => {
      chosen = Math.min(places.length - 1, Math.max(0, index));
      moveUprights(plots, places[chosen]);
      const words = show(chosen);
      for (const plot of plots) {
        plot.setAttribute('aria-valuenow', String(chosen));
        plot.setAttribute('aria-valuetext', words);
      }
    };
    const keys = {
      ArrowRight: () => chosen + 1,
      ArrowUp: () => chosen + 1,
      ArrowLeft: () => chosen - 1,
      ArrowDown: () => chosen - 1,
      PageUp: () => chosen + 25,
      PageDown: () => chosen - 25,
      Home: () => 0,
      End: () => places.length - 1,
    };
    for (const plot of plots) {
      plot.tabIndex = 0;
      plot.setAttribute('role', 'slider');
      plot.setAttribute('aria-label', `${plot.dataset.name}: chosen point`);
      plot.setAttribute('aria-valuemin', '0');
      plot.setAttribute('aria-valuemax', String(places.length - 1));
      plot.setAttribute('aria-valuenow', '0');
      plot.addEventListener('focus', () => choose(chosen));
      plot.addEventListener('keydown', (event) => {
        const next = keys[event.key];
        if (next === undefined || event.ctrlKey || event.altKey || event.metaKey) return;
        event.preventDefault();
        choose(next());
      });
      const point = (event) => {
        const svg = event.target.closest('svg');
        if (svg === null) return;
        const box = svg.getBoundingClientRect();
        const { left, per } = svg.querySelector('.axis').dataset;
        const x = ((event.clientX - box.left) / box.width) * svg.viewBox.baseVal.width;
        choose(nearest(places, (x - Number(left)) / Number(per)));
      };
      plot.addEventListener('pointermove', point);
      plot.addEventListener('pointerdown', point);
    }
    return choose;
  }

  function placeWords(data, i) {
    const lap = data.lapMm > 0 ? Math.max(0, Math.floor(data.s[i] / data.lapMm)) : 0;
    const at = data.s[i] - lap * data.lapMm;
    const piece = data.pieces.findLast(([start]) => start <= at) ?? data.pieces[0];
    return `${data.lapMm > 0 ? `lap ${lap + 1}, ` : ''}${(at / 1000).toFixed(2)} m, ${piece[1]}`;
  }

  function momentWords(data, i) {
    const error = data.e[i] / 10;
    const side = error === 0 ? 'on the middle' : `${Math.abs(error).toFixed(1)} mm ${error > 0 ? 'left' : 'right'}`;
    const name = data.classes[data.c[i]];
    return [
      `${(data.t[i] / 1000).toFixed(2)} s`,
      placeWords(data, i),
      side,
      `${(data.v[i] / 1000).toFixed(2)} m/s`,
      `duty left ${data.l[i]} %, right ${data.r[i]} %`,
      ...(name === undefined ? [] : [`class ${name}`]),
    ].join('; ');
  }

  const runs = [...document.querySelectorAll('.run')].map((section) => {
    const data = readData(section, 'run-data');
    const readout = section.querySelector('.readout');
    const markers = section.querySelectorAll('.marker');
    const mark = (i) => {
      for (const marker of markers) {
        const { left, top, per } = marker.dataset;
        const [x, y] = [(data.x[i] - Number(left)) * Number(per), (Number(top) - data.y[i]) * Number(per)];
        marker.setAttribute('transform', `translate(${x} ${y})`);
        marker.setAttribute('visibility', 'visible');
      }
      readout.textContent = momentWords(data, i);
      return readout.textContent;
    };
    const seconds = data.t.map((ms) => ms / 1000);
    return { data, choose: followPlots([...section.querySelectorAll('.plot')], seconds, mark) };
  });

  const band = document.querySelector('.band');
  if (band !== null) {
    const data = readData(band, 'band-data');
    const readout = band.querySelector('.readout');
    const run = runs[0];
    const show = (i) => {
      // the last time that the first run shown passed the place
      const passed = run?.data.s.findLastIndex((s) => {
        const at = run.data.lapMm > 0 ? s - Math.floor(s / run.data.lapMm) * run.data.lapMm : s;
        return Math.abs(at - data.s[i]) < 30;
      });
      if (passed !== undefined && passed >= 0) run.choose(passed);
      const mm = (tenths) => (tenths === null ? 'no run' : `${(tenths / 10).toFixed(1)} mm`);
      readout.textContent = `${(data.s[i] / 1000).toFixed(2)} m: ${mm(data.lo[i])} to ${mm(data.hi[i])}; rms ${mm(data.rms[i])}`;
      return readout.textContent;
    };
    const metres = data.s.map((mm) => mm / 1000);
    followPlots([...band.querySelectorAll('.plot')], metres, show);
  }
})();
