// The vocabulary: every field of every table, with the words that people use for it.

#include <array>

#include "geo/imports/columns.h"

namespace unstring {
namespace {

using enum FieldKind;

constexpr std::array kPoles = {
    Field{"pole_id", text,
          "pole poleid polenum polenumber poleno poletag tag tagno assetid asset facilityid structureid "
          "lightid lampid id"},
    Field{"string_id", text,
          "string stringid stringno circuit circuitid circuitno cktid ckt loop loopid seriescircuit seriesid "
          "feedingcircuit"},
    Field{"order", number, "wiringorder sequence seq seqno sequenceno position pos lamporder orderonstring"},
    Field{"easting", coordinate, "x xcoord xcoordinate pointx east eastcoord coordx e"},
    Field{"northing", coordinate, "y ycoord ycoordinate pointy north northcoord coordy n"},
    Field{"lon", coordinate, "longitude long lng xlon londeg ddlon"},
    Field{"lat", coordinate, "latitude ylat latdeg ddlat"},
    Field{"status", text, "polestatus state lifecycle assetstatus"},
    Field{"fixture", text,
          "lamp lamptype luminaire luminairetype fixturetype lighttype head headtype bulb bulbtype"},
    Field{"lamp_w", number, "lampwatts lampwatt watts watt wattage lampwattage systemw systemwatts power"},
    Field{"lamp_pf", number, "pf powerfactor cosphi lamppowerfactor"},
    Field{"mount_m", length_m,
          "mount mounting mountheight mountingheight mounth mntht mtght mountht lightheight"},
    Field{"arm_m", length_m, "arm armlength bracket bracketlength armlen mastarm"},
    Field{"arm_deg", number, "armbearing armazimuth armdirection bracketbearing armdir"},
    Field{"pole_kind", text, "polekind poletype polematerial material kind"},
    Field{"epa_allow_m2", area_m2, "epaallow epa allowedepa maxepa epaallowed poleepa"},
    Field{"condition", text, "polecondition cond"},
    Field{"attachments", text, "attachment attached attach"},
    Field{"road_class", text, "roadclass class functionalclass streetclass roadtype"},
    Field{"need_lm", number, "needlm needlumens lumensneeded requiredlumens lumens"},
    Field{"critical", text, "iscritical criticalpole"},
    Field{"street", text, "streetname road roadname stname onstreet location"},
    Field{"side", text, "sideofstreet streetside"},
    Field{"ward", text, "district council councildistrict warddistrict"},
    Field{"feed", text, "feedtype supplytype ugoh ohug construction"},
    Field{"duct", text, "ductstate ductcondition conduit conduitstate raceway"},
    Field{"spare_duct", text, "spareduct spareconduit"},
    Field{"secondary_here", text, "secondary secondaryhere secondaryavailable"},
    Field{"owner", text, "ownership poleowner ownedby"},
    Field{"consent", text, "ownerconsent"},
    Field{"earliest_year", number, "earliestyear earliest notbefore"},
    Field{"solar_ok", text, "solarok solarallowed"},
    Field{"note", text, "notes remark remarks comment comments memo"},
};

constexpr std::array kCircuits = {
    Field{"string_id", text, "string stringid stringno circuit circuitid circuitno cktid ckt loop loopid id"},
    Field{"kind", text, "type circuittype circuitkind"},
    Field{"current_a", number, "current amps amperes ratedcurrent ratedamps"},
    Field{"station_e", coordinate, "stationeast stationeasting stationx stationxcoord easting x"},
    Field{"station_n", coordinate, "stationnorth stationnorthing stationy stationycoord northing y"},
    Field{"lon", coordinate, "stationlon longitude long lng"},
    Field{"lat", coordinate, "stationlat latitude"},
    Field{"cable_awg", text, "awg cablesize wiresize cable gauge"},
    Field{"cable_kv", number, "cableclass cablevolts cablevoltage cablerating"},
    Field{"length_m", length_m, "length cablelength looplength circuitlength"},
    Field{"pulsing", text, "pulses ispulsing"},
    Field{"control", text, "controltype switching"},
    Field{"control_from", text, "controlfrom controlledby cascadefrom"},
    Field{"primary_feeder", text, "feeder primaryfeeder primary"},
    Field{"faults_year", number, "faultsyear faultsperyear faults outages"},
    Field{"asfound_a", number, "asfoundamps asfoundcurrent measuredamps"},
    Field{"asfound_v", number, "asfoundvolts asfoundvoltage measuredvolts"},
    Field{"insulation_mohm", number, "insulation megger insulationmohm insulationresistance"},
    Field{"asfound_date", text, "asfounddate measureddate measuredon"},
};

constexpr std::array kTransformers = {
    Field{"transformer_id", text,
          "transformer transformerid transformerno unit unitid unitno rotid rotransformer regulatorid "
          "regulator assetid id"},
    Field{"rated_kw", number, "rated rating kwrating ratingkw size kw"},
    Field{"output_a", number, "output outputamps outputcurrent secondaryamps amps"},
    Field{"min_frac", number, "minfrac minload minloadfrac"},
    Field{"taps", text, "tap tapsettings"},
    Field{"build", text, "construction type buildtype"},
    Field{"open_v", number, "openvolts opencircuitvolts opencircuitv ocv"},
    Field{"primary_v", number, "primary primaryvolts primaryvoltage inputvolts"},
    Field{"mount", text, "mounting mounttype"},
    Field{"made", text, "year yearmade made manufactured manufacturedate datemade"},
    Field{"tested", text, "testdate lasttest lasttested datetested"},
    Field{"oil", text, "oiltype fluid coolant"},
    Field{"state", text, "status condition"},
    Field{"string_id", text, "string stringid circuit circuitid feeds feedsstring ckt"},
};

constexpr std::array kCutbacks = {
    Field{"string_id", text, "string stringid circuit circuitid ckt"},
    Field{"pole_a", text, "polea from frompole a"},
    Field{"pole_b", text, "poleb to topole b"},
    Field{"kind", text, "type place"},
    Field{"confirmed", text, "isconfirmed verified"},
    Field{"new_cable_m", length_m, "newcable newcablelength cable cablelength"},
};

constexpr std::array kServices = {
    Field{"service_id", text, "service serviceid serviceno servicepoint meterid id"},
    Field{"kind", text, "type servicekind servicetype"},
    Field{"easting", coordinate, "x xcoord xcoordinate pointx east coordx"},
    Field{"northing", coordinate, "y ycoord ycoordinate pointy north coordy"},
    Field{"lon", coordinate, "longitude long lng"},
    Field{"lat", coordinate, "latitude"},
    Field{"pole_id", text, "pole poleid polenum poleno atpole"},
    Field{"volts", number, "voltage v"},
    Field{"free_kva", number, "free kvafree capacity sparekva spare"},
    Field{"lead_weeks", number, "lead leadtime weeks"},
};

constexpr std::array kStreets = {
    Field{"street", text, "name streetname road roadname stname fullname"},
    Field{"road_class", text, "roadclass class functionalclass streetclass roadtype highway"},
    Field{"surface", text, "surfacetype edge"},
    Field{"width_m", length_m, "width roadwidth streetwidth"},
    Field{"repave_year", number, "repave repaveyear repaving repavingyear paveyear"},
};

constexpr std::array kCanopy = {
    Field{"height_m", length_m, "height treeheight canopyheight ht"},
    Field{"leaf", text, "leaftype foliage"},
    Field{"protected", text, "isprotected heritage"},
};

constexpr std::array kObstacles = {
    Field{"height_m", length_m, "height buildingheight bldgheight ht roofheight"},
};

constexpr std::array kClimate = {
    Field{"month", text, "mon monthno"},
    Field{"ghi_kwh_m2_day", number, "ghi globalhorizontal irradiation ghikwhm2day"},
    Field{"temp_c", number, "temp temperature tempc airtemp airtemperature"},
    Field{"albedo", number, "groundreflectance reflectance"},
};

constexpr std::array kBudget = {
    Field{"year", number, "fiscalyear fy"},
    Field{"money", number, "capital budget amount dollars"},
    Field{"fund", text, "fundname source"},
    Field{"wards", text, "ward districts"},
    Field{"kinds", text, "kind uses"},
    Field{"spend_by", text, "spendby deadline"},
    Field{"match_frac", number, "match matchfrac matching"},
    Field{"line_h", number, "line linehours linecrew linecrewhours"},
    Field{"civil_h", number, "civil civilhours civilcrew civilcrewhours"},
    Field{"lighting_h", number, "lighting lightinghours lightingcrew lightingcrewhours"},
    Field{"electric_h", number, "electric electrichours electricians electriccrew electriccrewhours"},
};

constexpr std::array kPrices = {
    Field{"item", text, "price priceitem code"},
    Field{"unit", text, "per uom"},
    Field{"low", number, "lowprice min"},
    Field{"base", number, "baseprice price cost mid"},
    Field{"high", number, "highprice max"},
    Field{"note", text, "notes source remark remarks comment"},
    Field{"date", text, "pricedate asof"},
    Field{"from_year", number, "from fromyear since"},
    Field{"to_year", number, "to toyear until"},
    Field{"change_frac_year", number, "change changefrac changefracyear escalation"},
};

constexpr std::array kMarks = {
    Field{"pole_id", text, "pole poleid polenum polenumber poleno poletag tag id"},
    Field{"mark", text, "choice wish"},
    Field{"lock", text, "locked islocked"},
    Field{"year", number, "workyear"},
    Field{"who", text, "by person name"},
    Field{"note", text, "notes remark remarks comment"},
};

constexpr std::array kAsbuilt = {
    Field{"pole_id", text, "pole poleid polenum polenumber poleno poletag tag id"},
    Field{"done", text, "isdone complete completed"},
    Field{"date", text, "datedone donedate"},
    Field{"order", number, "wiringorder neworder sequence"},
    Field{"amps", number, "current asfoundamps amperes"},
    Field{"volts", number, "voltage asfoundvolts"},
    Field{"insulation_mohm", number, "insulation megger insulationmohm"},
    Field{"duct_found", text, "ductfound duct ductstate"},
    Field{"head", text, "headtype"},
    Field{"serial", text, "serialno serialnumber"},
    Field{"battery_date", text, "batterydate"},
    Field{"photo", text, "picture image"},
    Field{"note", text, "notes remark remarks comment"},
};

} // namespace

std::span<const Field> fields_of(std::string_view table) {
    if (table == "poles") return kPoles;
    if (table == "circuits") return kCircuits;
    if (table == "transformers") return kTransformers;
    if (table == "cutbacks") return kCutbacks;
    if (table == "services") return kServices;
    if (table == "streets") return kStreets;
    if (table == "canopy") return kCanopy;
    if (table == "obstacles") return kObstacles;
    if (table == "climate") return kClimate;
    if (table == "budget") return kBudget;
    if (table == "prices") return kPrices;
    if (table == "marks") return kMarks;
    if (table == "asbuilt") return kAsbuilt;
    return {};
}

} // namespace unstring
