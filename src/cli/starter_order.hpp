#pragma once

#include <string>

namespace duskleaf {

/// What a starter order needs; latitude and longitude as the person wrote them.
struct StarterPlace {
  std::string name, latitude, longitude, time_zone;
  int year;
  bool invented = false;  // example values, to be changed
};

/// The commented text of a starter order. It reads as an order when the place is right.
std::string starter_order(const StarterPlace&);

/// What an order's reader says of it, without the place in the file; empty when it is right.
std::string trouble_with(const StarterPlace&);

/// An id made of a name: small letters and digits, hyphens between; "home" when nothing is left.
std::string id_from_name(const std::string& name);

}  // namespace duskleaf
