/* Only enhances: every page is complete without it. Sorts and filters the list of machines. */
(function () {
  'use strict';
  var table = document.getElementById('machines');
  var form = document.getElementById('filters');
  if (!table || !form) return;
  form.hidden = false;
  var body = table.tBodies[0];
  var rows = Array.prototype.slice.call(body.rows);
  var fields = ['search', 'area', 'condition', 'urgency', 'criticality'].map(function (name) {
    return document.getElementById('f-' + name);
  });
  var count = document.getElementById('f-count');
  var text = rows.map(function (row) { return row.textContent.toLowerCase(); });

  function apply() {
    var wanted = fields.map(function (field) { return field.value; });
    var shown = 0;
    rows.forEach(function (row, i) {
      var fits = (!wanted[0] || text[i].indexOf(wanted[0].toLowerCase()) >= 0) &&
        (!wanted[1] || row.cells[3].textContent === wanted[1]) &&
        (!wanted[2] || row.getAttribute('data-c') === wanted[2]) &&
        (!wanted[3] || row.getAttribute('data-u') === wanted[3]) &&
        (!wanted[4] || row.cells[4].textContent === wanted[4]);
      row.hidden = !fits;
      if (fits) shown += 1;
    });
    count.textContent = shown + ' ' + count.getAttribute('data-of') + ' ' + rows.length;
  }

  fields.forEach(function (field) { field.addEventListener('input', apply); });
  form.addEventListener('submit', function (event) { event.preventDefault(); });

  var CONDITIONS = ['D', 'r-D', 'C', 'r-C', 'B', 'r-B', 'A', 'r-A', 'none'];
  /* The most urgent first, as the filter lists them; a dash last. */
  var URGENCIES = Array.prototype.map.call(document.getElementById('f-urgency').options, function (option) { return option.value; }).slice(1).concat('\u2013');
  function key(row, column) {
    if (column === 1) return CONDITIONS.indexOf(row.getAttribute('data-c'));
    if (column === 2) return URGENCIES.indexOf(row.getAttribute('data-u'));
    var content = row.cells[column].textContent.trim();
    if (column === 6 || column === 7) {
      var number = parseFloat(content.replace('\u2212', '-').replace(/\u202f/g, '').replace(',', '.').replace(/[^\d.+-]/, ''));
      return isNaN(number) ? -Infinity : number;
    }
    return content;
  }
  Array.prototype.forEach.call(table.tHead.rows[0].cells, function (cell, column) {
    if (column === 8) return;
    var button = document.createElement('button');
    button.type = 'button';
    button.textContent = cell.textContent;
    cell.textContent = '';
    cell.appendChild(button);
    button.addEventListener('click', function () {
      var down = cell.getAttribute('aria-sort') === 'ascending';
      Array.prototype.forEach.call(table.tHead.rows[0].cells, function (other) { other.removeAttribute('aria-sort'); });
      cell.setAttribute('aria-sort', down ? 'descending' : 'ascending');
      rows.slice().sort(function (a, b) {
        var x = key(a, column), y = key(b, column);
        var order = x < y ? -1 : x > y ? 1 : rows.indexOf(a) - rows.indexOf(b);
        return down ? -order : order;
      }).forEach(function (row) { body.appendChild(row); });
    });
  });
  apply();
}());
