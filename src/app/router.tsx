/** Every path of the product. Each page is a chunk of its own, loaded when its path is asked for. */
import type { ComponentType } from 'react'
import { createBrowserRouter, type RouteObject } from 'react-router-dom'
import { ErrorPage } from './ErrorPage.tsx'
import { Layout } from './Layout.tsx'

const page = (load: () => Promise<ComponentType>): Pick<RouteObject, 'lazy'> => ({
  lazy: async () => ({ Component: await load() }),
})

export const router = createBrowserRouter([
  {
    Component: Layout,
    ErrorBoundary: ErrorPage,
    HydrateFallback: () => null,
    children: [
      {
        ErrorBoundary: ErrorPage,
        children: [
          // advisor
          { index: true, ...page(async () => (await import('../pages/advisor/HomePage.tsx')).HomePage) },
          { path: 'fitting', ...page(async () => (await import('../pages/advisor/FittingPage.tsx')).FittingPage) },
          { path: 'findings', ...page(async () => (await import('../pages/advisor/FindingsPage.tsx')).FindingsPage) },
          { path: 'working', ...page(async () => (await import('../pages/advisor/WorkingPage.tsx')).WorkingPage) },
          // catalogue
          { path: 'range', ...page(async () => (await import('../pages/catalogue/RangePage.tsx')).RangePage) },
          {
            path: 'range/:slug',
            ...page(async () => (await import('../pages/catalogue/WheelsetPage.tsx')).WheelsetPage),
          },
          {
            path: 'side-by-side',
            ...page(async () => (await import('../pages/catalogue/SideBySidePage.tsx')).SideBySidePage),
          },
          // basket, checkout
          { path: 'basket', ...page(async () => (await import('../pages/basket/BasketPage.tsx')).BasketPage) },
          { path: 'checkout', ...page(async () => (await import('../pages/checkout/CheckoutPage.tsx')).CheckoutPage) },
          {
            path: 'orders/:orderNumber',
            ...page(async () => (await import('../pages/checkout/OrderPage.tsx')).OrderPage),
          },
          {
            path: 'orders/:orderNumber/left',
            ...page(async () => (await import('../pages/checkout/LeftPage.tsx')).LeftPage),
          },
          // account
          { path: 'sign-in', ...page(async () => (await import('../pages/account/SignInPage.tsx')).SignInPage) },
          { path: 'account', ...page(async () => (await import('../pages/account/AccountPage.tsx')).AccountPage) },
          // desks (support-desk, product-desk)
          {
            ...page(async () => (await import('./DeskLayout.tsx')).DeskLayout),
            children: [
              {
                path: 'desk/orders',
                ...page(async () => (await import('../pages/support-desk/DeskOrdersPage.tsx')).DeskOrdersPage),
              },
              {
                path: 'desk/orders/:orderNumber',
                ...page(async () => (await import('../pages/support-desk/DeskOrderPage.tsx')).DeskOrderPage),
              },
              {
                path: 'product/wheelsets',
                ...page(
                  async () => (await import('../pages/product-desk/ProductWheelsetsPage.tsx')).ProductWheelsetsPage,
                ),
              },
              {
                path: 'product/wheelsets/:sku',
                ...page(
                  async () => (await import('../pages/product-desk/ProductWheelsetPage.tsx')).ProductWheelsetPage,
                ),
              },
              {
                path: 'product/limits',
                ...page(async () => (await import('../pages/product-desk/LimitsPage.tsx')).LimitsPage),
              },
              {
                path: 'product/rules',
                ...page(async () => (await import('../pages/product-desk/RulesPage.tsx')).RulesPage),
              },
              {
                path: 'product/rules/:name',
                ...page(async () => (await import('../pages/product-desk/RuleTablePage.tsx')).RuleTablePage),
              },
            ],
          },
          { path: '*', Component: ErrorPage },
        ],
      },
    ],
  },
])
