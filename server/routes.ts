/** Every route of the shop, one feature after the other. The access test and the OpenAPI document read this list. */
import { accountRoutes } from './features/account/routes.ts'
import { advisorRoutes } from './features/advisor/routes.ts'
import { basketRoutes } from './features/basket/routes.ts'
import { catalogueRoutes } from './features/catalogue/routes.ts'
import { checkoutRoutes } from './features/checkout/routes.ts'
import { productDeskRoutes } from './features/product-desk/routes.ts'
import { supportDeskRoutes } from './features/support-desk/routes.ts'
import { healthRoutes, openApiRoute } from './http/health.ts'
import type { Route } from './http/route.ts'

export const routes: readonly Route[] = [
  ...healthRoutes,
  openApiRoute(() => routes),
  ...advisorRoutes,
  ...catalogueRoutes,
  ...accountRoutes,
  ...basketRoutes,
  ...checkoutRoutes,
  ...supportDeskRoutes,
  ...productDeskRoutes,
]
