/* Runs before first paint: the paper and the hand the person chose, else the phone's. */
(function () {
  var root = document.documentElement;
  var kept = {};
  try { kept = JSON.parse(localStorage.getItem('beltbook.settings') || '{}'); } catch (e) { kept = {}; }
  root.dataset.mode = kept.mode || (matchMedia('(prefers-color-scheme: dark)').matches ? 'night' : 'day');
  root.dataset.hand = kept.hand || 'right';
}());
