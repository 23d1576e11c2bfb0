/* Sets the theme before the first paint. The key and its values are those of src/stores/preferences.ts. */
(function () {
  var theme = null;
  try {
    theme = JSON.parse(localStorage.getItem('oxymel.preferences') || '{}').theme;
  } catch {
    theme = null;
  }
  if (theme !== 'light' && theme !== 'dark') {
    theme = matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light';
  }
  document.documentElement.dataset.theme = theme;
})();
