import { config } from '@vue/test-utils';
import { Dialog, Notify, Quasar } from 'quasar';

/** Mounts every component with Quasar, as the application does. */
config.global.plugins.push([Quasar, { plugins: { Dialog, Notify } }]);
