declare module "*.csv" {
  const text: string;
  export default text;
}
declare const PRODUCT_VERSION: string;
