'use strict';

// Usage: node check-index.js PATH/index.html PATH/browser WORDS
//
// Opens the index in the browser, types the words into its search field and prints one line of JSON:
//   faults   whatever the page or the browser complained of, and whatever it asked the network for
//   found    the lots and nights that are still shown
//   said     what is read out beside the search field
//   overflow whether the page is wider than a small window
// Exit 0 where that could be found out, whatever was found.

const { opened } = require('./opened');

opened(process.argv[2], process.argv[3], async (page) => {
  await page.getByLabel('Seek').fill(process.argv[4]);
  return {
    found: await page.locator('[data-name]:visible th').allInnerTexts(),
    said: await page.getByRole('status').innerText(),
  };
});
