import './app/app.css';

// Two programs share this page. A listener's phone loads a small one of its own; everybody else the whole application.
const root = document.getElementById('root');
if (root === null) throw new Error('the page has no root element');

const isListener = /^\/(listen|seat)(\/|$)/.test(window.location.pathname);
const program = isListener ? await import('./listener/start.tsx') : await import('./app/start.tsx');
program.start(root);
