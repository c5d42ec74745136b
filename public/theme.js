// Before the first paint, so that a chosen theme does not flash; components/theme.ts writes the choice.
(function () {
  try {
    var choice = localStorage.getItem('ebbline.theme');
    if (choice === 'light' || choice === 'dark') document.documentElement.dataset.theme = choice;
  } catch (error) {
    // Storage may be denied: the system's theme then stands.
  }
})();
