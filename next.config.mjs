/** @type {import('next').NextConfig} */
const config = {
  reactStrictMode: true,
  poweredByHeader: false,
  // A stray lock file higher up must not be taken for the root of this project.
  turbopack: { root: import.meta.dirname },
}

export default config
