/// <reference types="vite/client" />

/** For lint, which reads no Vue files; vue-tsc knows each component's own type. */
declare module '*.vue' {
  import type { Component } from 'vue';

  const component: Component;
  export default component;
}
