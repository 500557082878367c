/** The running product that browser tests visit, as the set-up describes it to the workers. */
export type Product = {
  /** For example http://127.0.0.1:40123, without a trailing slash. */
  origin: string;
  /** The page that shows what the server "sent". */
  mailPage: string;
  databaseUrl: string;
  /** The people of the reference scenario. */
  signIns: { who: string; email: string; password: string }[];
};

const variable = 'FLIGHTCASE_TEST_PRODUCT';

/** Workers are started afterwards and inherit the environment. */
export function announceProduct(product: Product): void {
  process.env[variable] = JSON.stringify(product);
}

/** The product of this run, or undefined before it was started. */
export function findProduct(): Product | undefined {
  const described = process.env[variable];
  return described === undefined ? undefined : (JSON.parse(described) as Product);
}
