// A part of the service worker: pages are asked of the network, so that what the server puts into them is fresh; where
// it does not answer, or not soon, the one page that is kept opens in their place.
(function () {
  var patienceMs = 6000;

  self.addEventListener('fetch', function (event) {
    var isPage = event.request.mode === 'navigate';
    var path = new URL(event.request.url).pathname;
    // Files that are opened as a page, and answers of the API, are the server's alone.
    if (!isPage || path.indexOf('/api/') === 0 || /\.\w+$/.test(path)) return;
    event.respondWith(freshOrKept(event.request));
  });

  function freshOrKept(request) {
    var fresh = fetch(request);
    var late = new Promise(function (resolve, reject) {
      setTimeout(reject, patienceMs);
    });
    return Promise.race([fresh, late]).catch(function () {
      return caches.match('/index.html', { ignoreSearch: true }).then(function (kept) {
        return kept || fresh;
      });
    });
  }
})();
