/** The form of the details: what stands beside it belongs to it, too, so that nothing typed is lost to another button. */
export const SHOP_FORM = 'shop-form';
