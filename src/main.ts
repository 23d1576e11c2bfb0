import '@fontsource/roboto/latin-400.css';
import '@fontsource/roboto/latin-500.css';
import '@fontsource/roboto/latin-ext-400.css';
import '@fontsource/roboto/latin-ext-500.css';
import 'quasar/src/css/index.sass';
import './css/tokens.css';
import './css/base.css';
import './css/quasar-theme.css';

import { createPinia } from 'pinia';
import { Dark, Notify, Quasar } from 'quasar';
import iconSet from 'quasar/icon-set/svg-material-symbols-outlined';
import { createApp } from 'vue';

import App from './App.vue';
import { createAppRouter } from './router/index.ts';

createApp(App)
  .use(createPinia())
  .use(Quasar, { plugins: { Dark, Notify }, iconSet, config: { notify: { position: 'bottom' } } })
  .use(createAppRouter())
  .mount('#app');
