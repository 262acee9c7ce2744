'use strict';

// Usage: node check-page.js PATH/report.html PATH/browser
//
// Opens the page in the browser as a person would and prints what came of it as one line of JSON:
//   faults   whatever the page or the browser complained of, and whatever it asked the network for
//   figures  the charts, each with its title, how many shapes it drew and how many values its table holds
//   readOff  what is read off the first chart after the right arrow key was pressed twice
//   overflow whether the page is wider than a small window
// Exit 0 where that could be found out, whatever was found.

const { chromium } = require('playwright-core');
const { pathToFileURL } = require('url');

async function look(path, executablePath) {
  const browser = await chromium.launch({
    executablePath,
    args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update'],
  });
  try {
    const page = await browser.newPage({ viewport: { width: 1024, height: 700 } });
    const faults = [];
    page.on('pageerror', (error) => faults.push(`error: ${error.message}`));
    page.on('console', (message) => faults.push(`console: ${message.text()}`));
    page.on('request', (request) => {
      if (!request.url().startsWith('file:')) {
        faults.push(`request: ${request.url()}`);
      }
    });
    await page.goto(pathToFileURL(path).href);
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
    await page.setViewportSize({ width: 400, height: 700 });
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth > window.innerWidth);
    return { faults, figures, readOff, overflow };
  } finally {
    await browser.close();
  }
}

look(process.argv[2], process.argv[3])
  .then((found) => console.log(JSON.stringify(found)))
  .catch((error) => {
    console.error(error.message);
    process.exitCode = 2;
  });
