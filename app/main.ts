/** Entry of the app, the same for the window on the desktop and the page in a browser. */
import { createPinia } from 'pinia';
import { createApp } from 'vue';
import App from './App.vue';

createApp(App).use(createPinia()).mount('#app');
