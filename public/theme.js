/* Before the first paint: the theme of the system, where neither a choice nor the browser's hint has told it. */
(() => {
  const root = document.documentElement;
  if (root.dataset.themeFrom !== 'guess') return;
  const dark = matchMedia('(prefers-color-scheme: dark)');
  const follow = () => {
    if (!/(^|; )theme=/.test(document.cookie)) root.dataset.theme = dark.matches ? 'dark' : 'light';
  };
  follow();
  dark.addEventListener('change', follow);
})();
