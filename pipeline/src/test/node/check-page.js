'use strict';

// Usage: node check-page.js PATH/report.html PATH/browser
//
// Opens the page in the browser as a person would and prints what came of it as one line of JSON:
//   faults   whatever the page or the browser complained of, and whatever it asked the network for
//   figures  the charts, each with its title, how many shapes it drew and how many values its table holds
//   readOff  what is read off the first chart after the right arrow key was pressed twice
//   overflow whether the page is wider than a small window
// Exit 0 where that could be found out, whatever was found.

const { opened } = require('./opened');

opened(process.argv[2], process.argv[3], async (page) => {
  for (const lot of await page.locator('.lot').all()) {
    await lot.scrollIntoViewIfNeeded();
    await lot.locator('figure svg, .charts:empty').first().waitFor({ state: 'attached' });
  }
  const figures = [];
  for (const figure of await page.locator('.charts figure').all()) {
    await figure.locator('summary').click();
    await figure.locator('.values table').waitFor({ state: 'attached' });
    figures.push({
      title: await figure.locator('h3').innerText(),
      shapes: await figure.locator('svg[role=img] g[clip-path] path').count(),
      values: await figure.locator('.values tbody tr').count(),
    });
  }
  let readOff = '';
  if (figures.length > 0) {
    const first = page.locator('.charts figure').first();
    await first.locator('svg[role=img]').focus();
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('ArrowRight');
    readOff = await first.locator('.read-off').innerText();
  }
  return { figures, readOff };
});
