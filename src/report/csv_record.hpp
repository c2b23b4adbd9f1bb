// One record of comma-separated values, RFC 4180: CRLF ends it, '.' is the decimal sign.
#pragma once

#include <string>
#include <vector>

namespace bandwright {

std::string csv_record(const std::vector<std::string>& fields);

/// The shortest text that reads back as the same number; empty where there is none.
std::string csv_number(double value);

}  // namespace bandwright
