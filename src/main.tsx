import './app/app.css';

// Two programs share this page. A listener's phone loads a small one of its own; everybody else the whole application.
const root = document.getElementById('root');
if (root === null) throw new Error('the page has no root element');

const isListener = /^\/(listen|seat)(\/|$)/.test(window.location.pathname);
// No top-level await here: the chunks loaded below may import this one, and would wait for it for ever.
const program = isListener ? import('./listener/start.tsx') : import('./app/start.tsx');
void program.then(({ start }) => start(root));
