/** @type {import("postcss-load-config").Config} */
const config = { plugins: { tailwindcss: {}, autoprefixer: {} } };

export default config;
