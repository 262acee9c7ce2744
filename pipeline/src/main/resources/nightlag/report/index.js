'use strict';

// Shows the lots and nights whose names hold every word that is sought.
(() => {
  const rows = [...document.querySelectorAll('[data-name]')].map((row) => ({ row, name: row.dataset.name.toLowerCase() }));
  const groups = [...document.querySelectorAll('.group')];
  const found = document.getElementById('found');
  const counted = (kind) => rows.filter(({ row }) => !row.hidden && row.classList.contains(kind)).length;

  document.getElementById('seek').addEventListener('input', (event) => {
    const words = event.target.value.trim().toLowerCase().split(/\s+/);
    rows.forEach(({ row, name }) => { row.hidden = !words.every((word) => name.includes(word)); });
    groups.forEach((group) => { group.hidden = !group.querySelector('[data-name]:not([hidden])'); });
    found.textContent = `lots: ${counted('lot-row')}, nights: ${counted('night-row')}`;
  });
})();
