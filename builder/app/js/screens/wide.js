/** Whether there is room for two panes: a signal that follows the window. */
import { signal } from '@preact/signals';

const query = matchMedia('(min-width: 56.25rem)');
export const wide = signal(query.matches);
query.addEventListener('change', () => { wide.value = query.matches; });
