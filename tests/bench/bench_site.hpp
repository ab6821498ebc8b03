#pragma once

#include <chrono>
#include <string>

#include "order/order.hpp"

namespace duskleaf {

/// An invented order of one site, built without a file, that the benchmarks share.
inline Order bench_order() {
  Order order;
  order.path = std::string("bench");
  order.folder = std::string(".");
  order.span = {2027, 1};
  order.starts_in_january = true;
  Publication handout;
  handout.template_name = std::string("monthly-handout");
  handout.name = std::string("handout");
  order.publications.push_back(handout);
  Site site;
  site.name = std::string("Tern Point Sky Watch");
  site.place.id = std::string("tern-point");
  site.place.observer = {Angle::from_degrees(54.18), Angle::from_degrees(-4.62), 35.0};
  site.place.zone = Zone::load("Europe/London").value();
  site.place.chart_hours.fill({std::chrono::minutes(21 * 60 + 30)});
  site.masthead.group = site.name;
  order.sites.push_back(site);
  return order;
}

}  // namespace duskleaf
