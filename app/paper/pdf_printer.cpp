#include "app/paper/pdf_printer.h"

#include <cstdio>

#include <QGuiApplication>
#include <QPainter>
#include <QPdfWriter>
#include <QSaveFile>

#include "app/paper/order_sheet.h"

namespace unstring {
namespace {

Fault write_fault(const std::string& path, const QString& found) {
    return {FaultCode::write_failed,
            path,
            0,
            {},
            found.toStdString(),
            "a file that can be written",
            "check the folder and the space left"};
}

void prepare(QPdfWriter& writer, const std::string& paper) {
    writer.setPageSize(QPageSize(paper == "letter" ? QPageSize::Letter : QPageSize::A4));
    writer.setPageMargins(QMarginsF(0, 0, 0, 0));
    writer.setResolution(static_cast<int>(72 * kPoint));
    writer.setTitle(QStringLiteral("Work orders"));
    writer.setCreator(QStringLiteral("Unstring"));
}

class PdfPrinter : public Printer {
public:
    explicit PdfPrinter(std::unique_ptr<QGuiApplication> application)
        : application_(std::move(application)) {}

    Expected<void> print_orders(const std::vector<WorkOrder>& orders, const std::string& path,
                                const std::string& paper) override {
        if (paper != "a4" && paper != "letter")
            return tl::make_unexpected(
                Fault{FaultCode::bad_usage, {}, 0, "--paper", paper, "a4 or letter", "name one of the two"});
        QSaveFile file(QString::fromStdString(path));
        if (!file.open(QIODevice::WriteOnly))
            return tl::make_unexpected(write_fault(path, file.errorString()));
        {
            QPdfWriter writer(&file);
            prepare(writer, paper);
            QPainter painter;
            if (!painter.begin(&writer))
                return tl::make_unexpected(write_fault(path, QStringLiteral("a page that cannot be begun")));
            bool is_first = true;
            for (const WorkOrder& order : orders) {
                Sheet dry(writer, nullptr, [&](Sheet& sheet) { paint_furniture(sheet, order, 99); });
                paint_order(dry, order);
                if (!is_first) writer.newPage();
                is_first = false;
                Sheet sheet(writer, &painter, [&](Sheet& each) { paint_furniture(each, order, dry.page()); });
                paint_order(sheet, order);
            }
            if (!painter.end())
                return tl::make_unexpected(write_fault(path, QStringLiteral("a write that stopped")));
        }
        if (!file.commit()) return tl::make_unexpected(write_fault(path, file.errorString()));
        return {};
    }

private:
    std::unique_ptr<QGuiApplication> application_;
};

} // namespace

namespace {

// On a machine without a desktop Qt warns of folders that paper does not need.
void say_only_failures(QtMsgType type, const QMessageLogContext&, const QString& text) {
    if (type == QtCriticalMsg || type == QtFatalMsg) std::fprintf(stderr, "%s\n", qPrintable(text));
}

} // namespace

std::unique_ptr<Printer> make_pdf_printer(int& argc, char** argv) {
    std::unique_ptr<QGuiApplication> application;
    if (QCoreApplication::instance() == nullptr) {
        qputenv("QT_QPA_PLATFORM", "offscreen");
        qInstallMessageHandler(say_only_failures);
        application = std::make_unique<QGuiApplication>(argc, argv);
    }
    return std::make_unique<PdfPrinter>(std::move(application));
}

} // namespace unstring
