import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import './tokens.css';
import './desk.css';
import { App } from './App.tsx';
import { startKeeping } from './desk/autosave.ts';
import { useDesk } from './desk/deskStore.ts';
import { followGuide } from './desk/guide.ts';
import { keepOffline } from './offline/keepOffline.ts';

// before anything is drawn in the new colours
useDesk.subscribe(({ theme }) => {
  document.documentElement.dataset.theme = theme;
});

const root = document.getElementById('root');
if (!root) throw new TypeError('the page has no #root');
createRoot(root).render(
  <StrictMode>
    <App />
  </StrictMode>,
);
void startKeeping();
followGuide();
void keepOffline();
