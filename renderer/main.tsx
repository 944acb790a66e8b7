import './style/index.css';
import './page.css';
import './plates/plate.css';
import './plates/nearEdges.css';
import { render } from 'preact';
import { connectKeyboard } from './commands/keyboard.js';
import { createEngine } from './engine.js';
import { createClient } from './host/client.js';
import { takeToken } from './host/token.js';
import { connectShell } from './services/connectShell.js';
import { keepPresence } from './services/presence.js';
import { start } from './services/start.js';
import { App } from './views/App.js';

const life = new AbortController();
const token = takeToken(location, history, sessionStorage);
const client = createClient(location.origin, { token, fetch: window.fetch.bind(window) });
const engine = createEngine(client, window, life.signal);

const root = document.getElementById('root');
if (root === null) throw new Error('invalid page: it has no root');
render(<App engine={engine} />, root);
connectKeyboard(engine, document);
connectShell(engine, window);
void start(engine);
void keepPresence(client, engine.store, life.signal);
