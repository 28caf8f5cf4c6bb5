/** For `require('electron')`: Playwright's loader and its console ask this way. */
module.exports = globalThis[Symbol.for('stand-in electron')]
