// Day or night before the first paint: the person's choice, else the computer's.
const kept = localStorage.getItem('desk-mode');
const night = kept ? kept === 'night' : matchMedia('(prefers-color-scheme: dark)').matches;
document.documentElement.dataset.mode = night ? 'night' : 'day';
